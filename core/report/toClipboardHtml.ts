import type { Note } from '../note/schema.js';
import { escapeHtml } from './escapeHtml.js';
import { measurementTable } from './measurementTable.js';
import { shortProvenance } from './shortProvenance.js';
import { spreadsheetCell } from './spreadsheetCell.js';
import { wideColumns } from './wideTable.js';

/** The wide table as bare HTML for the clipboard: a word processor keeps it as a table, and a spreadsheet finds no formula. */
export function toClipboardHtml(note: Note): string {
  const table = measurementTable(note);
  const columns = wideColumns(table);
  const head = columns.map(({ title }) => `<th>${escapeHtml(title)}</th>`).join('');
  const body = table.rows.map((row) => {
    const cells = columns.map(({ numeric, printed }) => {
      const text = printed(row);
      return `<td>${escapeHtml(numeric ? text : spreadsheetCell(text))}</td>`;
    });
    return `<tr>${cells.join('')}</tr>`;
  });
  const foot = shortProvenance(note).map(
    (text) => `<tr><td colspan="${columns.length}">${escapeHtml(spreadsheetCell(text))}</td></tr>`,
  );
  return `<table><thead><tr>${head}</tr></thead><tbody>${body.join('')}</tbody><tfoot>${foot.join('')}</tfoot></table>`;
}
