import { completeness } from '../note/life/index.js';
import type { Note } from '../note/schema.js';
import { escapeHtml } from './escapeHtml.js';

/** Who verified the note, what was amended and why, and what is still missing. */
export function lifeHtml(note: Note): string {
  const { seal, amendments } = note;
  const lines = [
    seal === null
      ? 'This note is not verified.'
      : `Verified by ${seal.by}, ${seal.at}. SHA-256 of the note: ${seal.sha256}`,
    ...amendments.map(({ by, at, why }) => `Amended by ${by}, ${at}: ${why}`),
    ...completeness(note).map(({ text }) => `Missing: ${text}`),
  ];
  const items = lines.map((text) => `<li>${escapeHtml(text)}</li>`).join('');
  return `<h2>State of the note</h2>\n<ul>${items}</ul>\n`;
}
