import { formatCount, formatFixed, formatQuantity, visibleText } from '../../core/format/index.js';
import type { MeasuredEdgeLine } from '../../core/note/index.js';
import { textTable } from './textTable.js';

/** Measured edge lines for people: a table, then what is to be said of them. Empty where there are none. */
export function edgesText(edges: readonly MeasuredEdgeLine[]): string {
  const values = edges.flatMap(({ id, soft, sharp }) => [
    { id, kernel: 'soft', value: soft },
    ...(sharp === null ? [] : [{ id, kernel: 'sharp', value: sharp }]),
  ]);
  if (values.length === 0) return '';
  const table = textTable(
    ['Edge', 'Kernel', 'Rise mm', 'SE', 'Crossings', 'FWHM mm', 'Step HU', 'Pixels', 'Slice'],
    values.map(({ id, kernel, value }) => [
      id,
      kernel,
      formatFixed(value.riseMm, 2),
      formatFixed(value.riseErrorMm, 2),
      formatFixed(value.crossingsMm, 2),
      formatFixed(value.blurFwhmMm, 2),
      formatQuantity(
        value.fromHu === null || value.toHu === null ? null : value.toHu - value.fromHu,
        'hu',
      ),
      formatCount(value.n),
      formatCount(value.sliceIndex === null ? null : value.sliceIndex + 1),
    ]),
  );
  const remarks = values.flatMap(({ id, kernel, value }) =>
    value.flags.map(({ text }) => `${id}, ${kernel}: ${visibleText(text)}\n`),
  );
  return `${table}${remarks.join('')}`;
}
