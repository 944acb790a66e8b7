import type { Note } from '../../note/schema.js';
import { type MeasurementTable, measurementTable } from '../measurementTable.js';
import { STENT_CAUTION } from '../stentSentence.js';
import type { RowItem, TableRow } from '../tableRow.js';
import { flagsText } from '../wideTable.js';
import type { PdfDocument, PdfPart } from './pdfParts.js';
import { contrastTable, detailTable, factsTable, summaryTable } from './pdfTables.js';

/** Which regions have a key image; the caller brings the pictures under these names. */
export interface PdfImages {
  readonly regionIds: readonly string[];
  /** Name of the picture of a region. */
  readonly nameOf: (regionId: string) => string;
}

/**
 * A note as the parts of a PDF document: what was measured and how far it can be trusted first, region by region with
 * its key image, then where the numbers come from. The same numbers as in every other export.
 */
export function pdfDocument(note: Note, images: PdfImages): PdfDocument {
  const table = measurementTable(note);
  return {
    title: 'Measurements on two reconstructions of one acquisition',
    head: headText(note),
    foot: table.synthetic
      ? 'SYNTHETIC: computed images of no patient. Measuring aid, not a medical device.'
      : 'Measuring aid, not a medical device. A licensed physician checks each value and owns the report.',
    parts: [
      ...opening(note, table),
      { kind: 'heading', text: 'Regions' },
      ...summary(table),
      ...details(table, images),
      { kind: 'heading', text: 'Contrasts' },
      ...contrasts(table),
      ...section(table, 'edge line', 'Edge lines'),
      ...section(table, 'profile', 'Profiles'),
      ...section(table, 'fitted stent', 'Fitted stents', STENT_CAUTION),
      { kind: 'heading', text: 'Where the numbers come from' },
      ...factsTable(table.facts),
      { kind: 'cautions', lines: table.cautions },
    ],
  };
}

function headText({ study, seal }: Note): string {
  const id = study.patientId ?? 'patient ID not stated';
  const state = seal === null ? 'unverified' : `verified by ${seal.by}, ${seal.at}`;
  return `${id} · reading note, ${state}`;
}

function opening(note: Note, { cautions }: MeasurementTable): readonly PdfPart[] {
  const state =
    note.seal === null
      ? 'This note is not verified.'
      : `Verified by ${note.seal.by} at ${note.seal.at}. SHA-256 of the note: ${note.seal.sha256}`;
  return [
    { kind: 'cautions', lines: cautions },
    { kind: 'line', text: state },
    ...note.amendments.map(
      ({ by, at, why }): PdfPart => ({ kind: 'line', text: `Amended by ${by} at ${at}: ${why}` }),
    ),
    ...(note.comment === '' ? [] : [{ kind: 'line', text: note.comment } as const]),
  ];
}

function summary(table: MeasurementTable): readonly PdfPart[] {
  const rows = table.rows.filter(({ item }) => item === 'region');
  if (rows.length === 0) return [{ kind: 'line', text: 'No region was measured.' }];
  return [summaryTable(rows), ...table.remarks.map((text): PdfPart => ({ kind: 'small', text }))];
}

function details(table: MeasurementTable, images: PdfImages): readonly PdfPart[] {
  return table.rows
    .filter(({ item }) => item === 'region')
    .map((row): PdfPart => {
      const picture = images.regionIds.includes(row.id)
        ? [{ kind: 'picture', name: images.nameOf(row.id) } as const]
        : [];
      return {
        kind: 'together',
        parts: [
          { kind: 'subheading', text: regionTitle(row) },
          ...picture,
          detailTable(row),
          ...remarks(row),
        ],
      };
    });
}

function contrasts(table: MeasurementTable): readonly PdfPart[] {
  const rows = table.rows.filter(({ item }) => item === 'contrast');
  if (rows.length === 0) return [{ kind: 'line', text: 'No contrast was computed.' }];
  return [contrastTable(rows), ...rows.flatMap(remarks)];
}

/** Rows of one kind, each with all its numbers; nothing where the note has none. */
function section(
  { rows }: MeasurementTable,
  item: RowItem,
  heading: string,
  caution?: string,
): readonly PdfPart[] {
  const own = rows.filter((row) => row.item === item);
  if (own.length === 0) return [];
  const definitions = new Set(
    own.map(({ definition }) => definition).filter((text) => text !== ''),
  );
  const opening: readonly PdfPart[] = [
    { kind: 'heading', text: heading },
    ...(caution === undefined ? [] : [{ kind: 'cautions', lines: [caution] } as const]),
    ...[...definitions].map((text): PdfPart => ({ kind: 'small', text })),
  ];
  return own.map(
    (row, index): PdfPart => ({
      kind: 'together',
      parts: [
        // No heading stays behind alone at the foot of a page.
        ...(index === 0 ? opening : []),
        { kind: 'subheading', text: `${row.id}: ${regionTitle(row)}` },
        ...numbersOf(row),
        ...remarks(row),
      ],
    }),
  );
}

/** Both kernels beside each other; a result of both at once in a table of its own. */
function numbersOf(row: TableRow): readonly PdfPart[] {
  const isBoth = ({ kernel }: TableRow['kernels'][number]) => kernel === 'both';
  return [row.kernels.filter(isBoth), row.kernels.filter((values) => !isBoth(values))]
    .filter((kernels) => kernels.some(({ quantities }) => quantities.length > 0))
    .map((kernels) => detailTable({ ...row, kernels }));
}

function regionTitle({ label, segment, finding, nominalMm, place }: TableRow): string {
  const nominal = nominalMm === null ? '' : `nominal ${nominalMm} mm`;
  return [label, segment, finding, nominal, place].filter((part) => part !== '').join(' · ');
}

function remarks(row: TableRow): readonly PdfPart[] {
  const parts = [
    // Elsewhere the place stands in the title.
    row.item === 'contrast' && row.place !== '' ? `${row.id}: ${row.place}.` : '',
    row.assessability === '' ? '' : `Assessability: ${row.assessability}.`,
    row.reason === '' ? '' : `Reason: ${row.reason}.`,
    row.quote.sentence,
    flagsText(row),
  ].filter((part) => part !== '');
  return parts.length === 0 ? [] : [{ kind: 'small', text: parts.join(' ') }];
}
