import { visibleText } from '../format/index.js';

const ENTITIES: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};

/** Text of any origin as HTML text or as the value of a quoted attribute; unseen characters are named, lines kept. */
export function escapeHtml(text: string): string {
  return text
    .split(/\r\n|\n/)
    .map((line) => visibleText(line).replace(/[&<>"']/g, (sign) => ENTITIES[sign] ?? ''))
    .join('<br>');
}
