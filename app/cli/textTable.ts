import { visibleText } from '../../core/format/index.js';

/** A table for a terminal: columns padded, text of files made visible, numbers (cells of type number) to the right. */
export function textTable(
  header: readonly string[],
  rows: readonly (readonly (string | number)[])[],
): string {
  const cells = rows.map((row) => row.map((cell) => visibleText(String(cell))));
  const numeric = header.map((_, column) => rows.some((row) => typeof row[column] === 'number'));
  const widths = header.map((title, column) =>
    Math.max(title.length, ...cells.map((row) => row[column]?.length ?? 0)),
  );
  const line = (row: readonly string[]) =>
    row
      .map((cell, column) => {
        const width = widths[column] ?? 0;
        return numeric[column] ? cell.padStart(width) : cell.padEnd(width);
      })
      .join('  ')
      .trimEnd();
  return `${[header, ...cells].map(line).join('\n')}\n`;
}
