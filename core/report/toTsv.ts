import { tsvFormatRow } from 'd3';
import { NO_VALUE } from '../format/index.js';
import type { Note } from '../note/schema.js';
import { measurementTable } from './measurementTable.js';
import { shortProvenance } from './shortProvenance.js';
import { spreadsheetCell } from './spreadsheetCell.js';
import { asciiPrinted } from './toCsv.js';
import { wideColumns } from './wideTable.js';

/** The wide table with printed digits, separated by tabs, for the clipboard and for spreadsheets. No value is an empty cell. */
export function toTsv(note: Note): string {
  const table = measurementTable(note);
  const columns = wideColumns(table);
  const rows = table.rows.map((row) =>
    columns.map(({ numeric, printed }) => {
      const text = printed(row);
      if (!numeric) return spreadsheetCell(text);
      return text === NO_VALUE || text === '' ? '' : spreadsheetCell(asciiPrinted(text));
    }),
  );
  const remarks = shortProvenance(note).map((remark) =>
    columns.map((_, index) => (index === 0 ? spreadsheetCell(remark) : '')),
  );
  const lines = [columns.map(({ title }) => title), ...rows, ...remarks];
  return lines.map((cells) => `${tsvFormatRow(cells)}\r\n`).join('');
}
