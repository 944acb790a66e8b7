import type { Note } from '../note/schema.js';
import { measurementTable } from './measurementTable.js';
import { spreadsheetCell } from './spreadsheetCell.js';
import { csvText } from './toCsv.js';
import { wideColumns } from './wideTable.js';

/**
 * The wide table: one line an item of the note, both kernels side by side, in full precision. Each line says
 * the software, the note and whether the study is synthetic; cautions follow as lines with the id 'note'.
 */
export function toWideCsv(note: Note): string {
  const table = measurementTable(note);
  const columns = wideColumns(table);
  const unit = note.pair.soft.unit;
  const tail = [
    unit,
    note.pair.soft.kernelLabel,
    note.pair.sharp?.kernelLabel ?? null,
    note.pair.soft.seriesInstanceUid,
    note.pair.sharp?.seriesInstanceUid ?? null,
    note.conditions.kvp,
    note.conditions.phasePercent,
    note.synthetic ? 'SYNTHETIC' : 'no',
    `${note.software.name} ${note.software.version}`,
    note.changedAt,
    note.id,
  ].map(spreadsheetCell);
  const header = [...columns.map(({ key }) => key), ...TAIL];
  const rows = table.rows.map((row) => [
    ...columns.map(({ exact }) => spreadsheetCell(exact(row))),
    ...tail,
  ]);
  const remarks = [
    ...table.remarks,
    ...table.definitions,
    ...table.facts.map(({ group, name, text }) => `${group}: ${name}: ${text}`),
    ...table.cautions,
  ].map((remark) => [
    ...columns.map(({ key }) =>
      spreadsheetCell(key === 'id' ? 'note' : key === 'label' ? remark : null),
    ),
    ...tail,
  ]);
  return csvText([header, ...rows, ...remarks]);
}

const TAIL = [
  'unit',
  'soft_kernel_label',
  'sharp_kernel_label',
  'soft_series_instance_uid',
  'sharp_series_instance_uid',
  'kvp',
  'phase_percent',
  'synthetic',
  'software',
  'changed_at',
  'note_id',
] as const;
