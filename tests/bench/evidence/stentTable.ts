import { type Accuracy, halfHeightAccuracy, regionAccuracy, summaryOf } from './stentAccuracy.js';
import { FITTED_ON, type FittedOn, type GridCase } from './stentGrid.js';

/** The table's head, for Markdown. */
export const STENT_TABLE_HEAD: readonly string[] = [
  '| way of reading | values of | diameter, mm: median, 95 % | covered | lumen, HU: median, 95 % | covered |',
  '| --- | --- | --- | --- | --- | --- |',
];

/** One line for each way of reading these stents: plain region, half height, and fitted, on soft, on sharp, on both. */
export function stentTable(
  cases: readonly GridCase[],
  fittedOn: readonly FittedOn[] = FITTED_ON,
): readonly string[] {
  const all = cases.length;
  const kernels = ['soft', 'sharp'] as const;
  return [
    ...kernels.map((side) => {
      const lumen = regionAccuracy(cases, side);
      return row(`plain region, ${side}`, lumen.values, all, undefined, lumen);
    }),
    ...kernels.map((side) => {
      const { diameterMm, lumenHu } = halfHeightAccuracy(cases, side);
      return row(`half height, ${side}`, diameterMm.values, all, diameterMm, lumenHu);
    }),
    ...fittedOn.map((side) => {
      const { fits, diameterMm, lumenHu } = summaryOf(cases, side);
      return row(`fitted, ${side}`, fits, all, diameterMm, lumenHu);
    }),
  ];
}

/** One line of the table. */
export function row(
  name: string,
  values: number,
  all: number,
  diameterMm: Accuracy | undefined,
  lumenHu: Accuracy,
): string {
  const cells = [
    name,
    `${values} of ${all}`,
    ...(diameterMm === undefined ? ['', ''] : [errors(diameterMm, 3), percent(diameterMm.covered)]),
    errors(lumenHu, 1),
    percent(lumenHu.covered),
  ];
  return `| ${cells.join(' | ')} |`;
}

function errors({ values, median, most95 }: Accuracy, digits: number): string {
  return values === 0 ? '' : `${median.toFixed(digits)}, ${most95.toFixed(digits)}`;
}

export function percent(part: number): string {
  return Number.isNaN(part) ? '' : `${(100 * part).toFixed(0)} %`;
}
