import { formatQuantity } from '../../core/format/index.js';
import type { MeasuredPlan } from '../../core/note/index.js';
import { textTable } from './textTable.js';

/** Lines across vessels for people: a table of widths on both kernels, and why there are none. */
export function profilesText(profiles: MeasuredPlan['profiles']): {
  readonly table: string;
  readonly remarks: readonly string[];
} {
  const values = profiles.flatMap(({ id, soft, sharp }) => [
    { id, kernel: 'soft', value: soft },
    ...(sharp === null ? [] : [{ id, kernel: 'sharp', value: sharp }]),
  ]);
  const mm = (value: number | null): string => formatQuantity(value, 'lengthMm');
  return {
    table: textTable(
      [
        'Profile',
        'Kernel',
        'Visible mm',
        'Peaks apart mm',
        'Strut mm',
        'Rise mm',
        'Lumen HU',
        'Narrowing %',
      ],
      values.map(({ id, kernel, value }) => [
        id,
        kernel,
        mm(value.visibleWidthMm),
        mm(value.peakDistanceMm),
        mm(value.strutWidthMm),
        mm(value.riseMm),
        formatQuantity(value.lumenHu, 'hu'),
        formatQuantity(value.narrowing === null ? null : 100 * value.narrowing, 'narrowingPercent'),
      ]),
    ),
    remarks: values.flatMap(({ id, kernel, value }) =>
      value.flags.map(({ text }) => `${id}, ${kernel}: ${text}`),
    ),
  };
}
