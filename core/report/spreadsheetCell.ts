import { visibleText } from '../format/index.js';

/** What a cell can hold: text of any origin, a number, or nothing. */
export type Cell = string | number | null;

/** Characters that make a spreadsheet take a cell for a formula, with the full-width forms that some convert first. */
const FORMULA_START = /^\s*[=+\-@＝＋－＠]/u;

/** Where a spreadsheet that separates by semicolons would see the start of a cell. */
const HIDDEN_START = /(;\s*)(?=[=+\-@＝＋－＠])/gu;

const PLAIN_NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;

/**
 * A cell that no spreadsheet takes for a formula: a text that begins like one gets an apostrophe before it, and
 * unseen characters are named. A plain number stays a number; null is an empty cell.
 * Source of the characters: OWASP, "CSV Injection" (from memory).
 */
export function spreadsheetCell(cell: Cell): string {
  if (cell === null) return '';
  if (typeof cell === 'number') return plainNumber(cell);
  const startsFormula = /^[\t\r]/.test(cell);
  const text = visibleText(oneLine(cell)).replace(HIDDEN_START, "$1'");
  if (PLAIN_NUMBER.test(text)) return text;
  return startsFormula || FORMULA_START.test(text) ? `'${text}` : text;
}

/** A number in full precision with an ASCII minus sign; nothing for what is not finite, and no negative zero. */
export function plainNumber(value: number): string {
  if (!Number.isFinite(value)) return '';
  return value === 0 ? '0' : String(value);
}

/** Text of several lines on one line: a cell with a line break inside spoils readers that go line by line. */
export function oneLine(text: string): string {
  return text.trimEnd().replace(/\r\n|[\r\n]/g, ' / ');
}
