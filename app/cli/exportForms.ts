import type { Note } from '../../core/note/index.js';
import {
  type ExportForm,
  type ImageLookup,
  toCsv,
  toHtml,
  toStructuredReport,
  toTsv,
} from '../../core/report/index.js';
import { jsonText } from './jsonText.js';
import { localMoment } from './localMoment.js';

/** What a form is made with, beside the note. */
export interface ExportInput {
  /** Images of the study, where the user gave a folder. */
  readonly images?: ImageLookup;
  /** The note as its file has it, with fields that this version does not know; absent for one that was de-identified. */
  readonly source?: unknown;
}

type Maker = (note: Note, input: ExportInput) => string | Uint8Array | Promise<string | Uint8Array>;

/** Every form of an export that this version has, and how it is made. */
export const EXPORT_FORMS: Readonly<Partial<Record<ExportForm, Maker>>> = {
  csv: toCsv,
  tsv: toTsv,
  html: toHtml,
  // As it stands: what a schema adds or leaves out would break the seal.
  json: (note, { source = note }) => jsonText(source),
  sr: (note, { images }) => toStructuredReport(note, { now: localMoment(new Date()), ...images }),
};
