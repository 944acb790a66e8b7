import { csvFormatRow } from 'd3';
import { MINUS, NO_VALUE } from '../format/index.js';
import type { Note } from '../note/schema.js';
import { measurementTable } from './measurementTable.js';
import type { QuantityValue } from './quantityDefinition.js';
import { type Cell, spreadsheetCell } from './spreadsheetCell.js';
import { imagesOf, type KernelValues, type TableRow } from './tableRow.js';

const COLUMNS = [
  'item',
  'id',
  'label',
  'role',
  'segment',
  'finding',
  'nominal_mm',
  'assessability',
  'reason',
  'place',
  'kernel',
  'kernel_label',
  'quantity',
  'value',
  'printed',
  'unit',
  'formula',
  'quoted',
  'quote',
  'quote_by',
  'quote_reason',
  'slice_index_from_0',
  'slice_offset_mm',
  'centre_x_mm',
  'centre_y_mm',
  'centre_z_mm',
  'sop_instance_uid',
  'frame_number',
  'series_instance_uid',
  'flags',
  'kvp',
  'phase_percent',
  'thickness_mm',
  'synthetic',
  'software',
  'changed_at',
  'note_id',
] as const;

type Column = (typeof COLUMNS)[number];
type Line = Partial<Readonly<Record<Column, Cell>>>;

/**
 * The long table: one line a value, in full precision and as printed, with everything that the value needs to be
 * read alone. Lines with the item 'note' follow: provenance, pair evidence and cautions, in the same columns.
 * RFC 4180 with a header line; UTF-8 without a byte order mark.
 */
export function toCsv(note: Note): string {
  const table = measurementTable(note);
  const shared: Line = {
    kvp: note.conditions.kvp,
    phase_percent: note.conditions.phasePercent,
    thickness_mm: note.conditions.thicknessMm,
    synthetic: note.synthetic ? 'SYNTHETIC' : 'no',
    software: `${note.software.name} ${note.software.version}`,
    changed_at: note.changedAt,
    note_id: note.id,
  };
  const values = table.rows.flatMap((row) =>
    row.kernels.flatMap((kernel) => quantitiesOf(kernel).map((q) => valueLine(row, kernel, q))),
  );
  const facts = table.facts.map(({ group, name, text }): Line => remark(`${group}: ${name}`, text));
  const remarks = [
    ...table.remarks.map((text): Line => remark('Remark', text)),
    ...table.definitions.map((text): Line => remark('Definition', text)),
  ];
  const cautions = table.cautions.map((text): Line => remark('Caution', text));
  const lines = [...values, ...remarks, ...facts, ...cautions].map((line) => {
    const cells: Line = { ...shared, ...line };
    return COLUMNS.map((column) => spreadsheetCell(cells[column] ?? null));
  });
  return csvText([COLUMNS, ...lines]);
}

/** Lines of RFC 4180: quoted where needed, each ended with CR LF. Cells must be harmless already. */
export function csvText(lines: readonly (readonly string[])[]): string {
  return lines.map((cells) => `${csvFormatRow([...cells])}\r\n`).join('');
}

/** A printed number for machines: an ASCII minus sign. */
export function asciiPrinted(printed: string): string {
  return printed === NO_VALUE ? 'no value' : printed.replaceAll(MINUS, '-');
}

/** A kernel without values keeps one line, so that its flags are not lost. */
function quantitiesOf({ quantities }: KernelValues): readonly (QuantityValue | undefined)[] {
  return quantities.length > 0 ? quantities : [undefined];
}

function valueLine(row: TableRow, kernel: KernelValues, quantity: QuantityValue | undefined): Line {
  return {
    item: row.item,
    id: row.id,
    label: row.label,
    role: row.role,
    segment: row.segment,
    finding: row.finding,
    nominal_mm: row.nominalMm,
    assessability: row.assessability,
    reason: row.reason,
    place: row.place,
    kernel: kernel.kernel,
    kernel_label: kernel.kernelLabel,
    quantity: quantity?.quantity ?? '',
    value: quantity?.value ?? null,
    printed: asciiPrinted(quantity?.printed ?? NO_VALUE),
    unit: quantity?.unit ?? '',
    formula: quantity?.formula ?? '',
    quoted: kernel.quoted ? 'yes' : 'no',
    quote: row.quote.kernel,
    quote_by: row.quote.by,
    quote_reason: row.quote.reason,
    ...imageColumns(kernel),
    slice_offset_mm: kernel.sliceOffsetMm,
    centre_x_mm: row.centreMm?.[0] ?? null,
    centre_y_mm: row.centreMm?.[1] ?? null,
    centre_z_mm: row.centreMm?.[2] ?? null,
    series_instance_uid: kernel.seriesInstanceUid,
    flags: [...kernel.flags, ...row.flags].join(' '),
  };
}

/** Where the values lie; of both kernels at once each image with ' / ' between, soft first. */
function imageColumns(values: KernelValues): Line {
  if (values.images === undefined) {
    return {
      slice_index_from_0: values.sliceIndex,
      sop_instance_uid: values.sopInstanceUid,
      frame_number: values.frameNumber,
    };
  }
  const images = imagesOf(values);
  const joined = (cells: readonly (string | number | null)[]): Cell =>
    cells.every((cell) => cell === null) ? null : cells.map((cell) => cell ?? '').join(' / ');
  return {
    slice_index_from_0: joined(images.map(({ sliceIndex }) => sliceIndex)),
    sop_instance_uid: joined(images.map(({ sopInstanceUid }) => sopInstanceUid)),
    frame_number: joined(images.map(({ frameNumber }) => frameNumber)),
  };
}

function remark(quantity: string, printed: string): Line {
  return { item: 'note', quantity, printed };
}
