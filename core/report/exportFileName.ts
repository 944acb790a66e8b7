import type { Note } from '../note/schema.js';

/** Endings of the forms of an export. */
const ENDINGS = {
  csv: 'csv',
  tsv: 'tsv',
  html: 'html',
  json: 'json',
  pdf: 'pdf',
  sr: 'dcm',
} as const;

export type ExportForm = keyof typeof ENDINGS;

/**
 * A file name to propose for an export: nothing of the patient or the reader is in it, and of a de-identified note not
 * even the day of the reading.
 */
export function exportFileName(
  { changedAt, deidentified }: Pick<Note, 'changedAt' | 'deidentified'>,
  form: ExportForm,
): string {
  const [day] = /^\d{4}-\d{2}-\d{2}/.exec(changedAt) ?? [];
  const what = deidentified === undefined ? (day ?? 'undated') : 'deidentified';
  return `reading-note-${what}.${ENDINGS[form]}`;
}
