import type { CorpusRow } from './row.js';

/** Where the table stands in README.md. */
export const LIMITS_BEGIN = '<!-- limits:begin -->';
export const LIMITS_END = '<!-- limits:end -->';

const LEGEND = [
  'READ: right values. READ+: read, and a finding travels with the series and its exports. SKIP: left out and counted,',
  'with its reason. REFUSE: this file, series or measurement is not offered, and a sentence says why.',
].join(' ');

/** The rows as a Markdown table: input, verdicts of its cases, what is done, codes of findings and reasons. */
export function limitsTable(rows: readonly CorpusRow[]): string {
  const lines = rows.map(({ row, title, outcome, cases }) => {
    const verdicts = unique(cases.map(({ verdict }) => verdict)).join(', ');
    const codes = unique(cases.flatMap(({ code }) => (code === undefined ? [] : [`\`${code}\``])));
    return `| ${row} | ${cell(title)} | ${verdicts} | ${cell(sentence(outcome))} | ${codes.join(', ')} |`;
  });
  return [
    LEGEND,
    '',
    '| # | What the files hold | Verdict | What is done | Code |',
    '| --- | --- | --- | --- | --- |',
    ...lines,
  ].join('\n');
}

/** A text with the table between its marks, and all else as it was. Throws when a mark is missing. */
export function withLimitsTable(text: string, rows: readonly CorpusRow[]): string {
  const begin = text.indexOf(LIMITS_BEGIN);
  const end = text.indexOf(LIMITS_END);
  if (begin === -1 || end < begin) throw new RangeError(`no marks for the table: ${LIMITS_BEGIN}`);
  const before = text.slice(0, begin + LIMITS_BEGIN.length);
  return `${before}\n\n${limitsTable(rows)}\n\n${text.slice(end)}`;
}

function unique<T>(values: readonly T[]): readonly T[] {
  return [...new Set(values)];
}

function sentence(text: string): string {
  const whole = text.endsWith('.') ? text : `${text}.`;
  return whole.charAt(0).toUpperCase() + whole.slice(1);
}

/** No bar and no tag inside a cell. */
function cell(text: string): string {
  return text.replaceAll('\\', '\\\\').replaceAll('|', '\\|').replaceAll('<', '&lt;');
}
