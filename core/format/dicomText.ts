import { visibleText } from './visibleText.js';

/**
 * A Person Name (PS3.5 6.2, VR PN) for people: 'Rowan^Alder^^Dr' → 'Rowan, Alder, Dr'. The first component group that has
 * text is shown; components keep the order of the standard: family, given, middle, prefix, suffix.
 */
export function formatPersonName(raw: string): string {
  const group = raw.split('=').find((text) => text.replaceAll('^', '').trim() !== '') ?? '';
  const [family = '', given = '', middle = '', prefix = '', suffix = ''] = group
    .split('^')
    .map((part) => visibleText(part.trim()));
  const names = [given, middle].filter((part) => part !== '').join(' ');
  return [family, names, prefix, suffix].filter((part) => part !== '').join(', ');
}

/** A Date (PS3.5 6.2, VR DA): '19580302' → '1958-03-02'. Anything else is shown as it stands. */
export function formatDicomDate(raw: string): string {
  const match = /^(\d{4})[.]?(\d{2})[.]?(\d{2})$/.exec(raw.trim());
  return match ? `${match[1]}-${match[2]}-${match[3]}` : visibleText(raw);
}
