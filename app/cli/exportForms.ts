import type { Note } from '../../core/note/index.js';
import {
  type ExportForm,
  type ImageLookup,
  toCsv,
  toHtml,
  toStructuredReport,
  toTsv,
} from '../../core/report/index.js';
import { pdfDocument } from '../../core/report/pdf/index.js';
import { toPdf } from '../host/exports/toPdf.js';
import { jsonText } from './jsonText.js';
import { localMoment } from './localMoment.js';

/** What a form is made with, beside the note. */
export interface ExportInput {
  /** Images of the study, where the user gave a folder. */
  readonly images?: ImageLookup;
  /** Key images by the identifiers of their regions, PNG files; none without a folder. */
  readonly pictures?: ReadonlyMap<string, Uint8Array>;
  /** The note as its file has it, with fields that this version does not know; absent for one that was de-identified. */
  readonly source?: unknown;
}

type Maker = (note: Note, input: ExportInput) => string | Uint8Array | Promise<string | Uint8Array>;

const NO_PICTURES: ReadonlyMap<string, Uint8Array> = new Map();

/** Every form of an export that this version has, and how it is made. */
export const EXPORT_FORMS: Readonly<Partial<Record<ExportForm, Maker>>> = {
  csv: (note) => toCsv(note),
  tsv: (note) => toTsv(note),
  html: (note, { pictures = NO_PICTURES }) =>
    toHtml(
      note,
      new Map([...pictures].map(([id, png]) => [id, Buffer.from(png).toString('base64')])),
    ),
  pdf: (note, { pictures = NO_PICTURES }) => {
    const nameOf = (regionId: string): string => `region-${regionId}`;
    return toPdf(
      pdfDocument(note, { regionIds: [...pictures.keys()], nameOf }),
      new Map([...pictures].map(([id, png]) => [nameOf(id), png])),
      new Date().toISOString(),
    );
  },
  // As it stands: what a schema adds or leaves out would break the seal.
  json: (note, { source = note }) => jsonText(source),
  sr: (note, { images }) => toStructuredReport(note, { now: localMoment(new Date()), ...images }),
};
