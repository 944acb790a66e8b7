import { type Accuracy, halfHeightAccuracy, regionAccuracy, summaryOf } from './stentAccuracy.js';
import { FITTED_ON, type FittedOn, type GridCase } from './stentGrid.js';

/** What one way of reading some stents came to. */
export interface StentRow {
  readonly way: string;
  /** Stents that were given a value, of how many. */
  readonly values: number;
  readonly of: number;
  /** Not there where the way tells no diameter. */
  readonly diameterMm: Accuracy | undefined;
  readonly lumenHu: Accuracy;
}

/** The table's head, for Markdown. */
export const STENT_TABLE_HEAD: readonly string[] = [
  '| way of reading | values of | diameter, mm: median, 95 % | covered | lumen, HU: median, 95 % | covered |',
  '| --- | --- | --- | --- | --- | --- |',
];

/** One row for each way of reading these stents: plain region, half height, and fitted, on soft, on sharp, on both. */
export function stentRows(
  cases: readonly GridCase[],
  fittedOn: readonly FittedOn[] = FITTED_ON,
): readonly StentRow[] {
  const of = cases.length;
  const kernels = ['soft', 'sharp'] as const;
  return [
    ...kernels.map((side): StentRow => {
      const lumenHu = regionAccuracy(cases, side);
      const values = lumenHu.values;
      return { way: `plain region, ${side}`, values, of, diameterMm: undefined, lumenHu };
    }),
    ...kernels.map((side): StentRow => {
      const { diameterMm, lumenHu } = halfHeightAccuracy(cases, side);
      return { way: `half height, ${side}`, values: diameterMm.values, of, diameterMm, lumenHu };
    }),
    ...fittedOn.map((side) => fittedRow(`fitted, ${side}`, cases, side)),
  ];
}

/** The row of fits alone. */
export function fittedRow(
  way: string,
  cases: readonly Pick<GridCase, 'truth' | 'fits'>[],
  side: FittedOn,
): StentRow {
  const { fits, diameterMm, lumenHu } = summaryOf(cases, side);
  return { way, values: fits, of: cases.length, diameterMm, lumenHu };
}

/** A row as a line of Markdown. */
export function rowInMarkdown({ way, values, of, diameterMm, lumenHu }: StentRow): string {
  const cells = [
    way,
    `${values} of ${of}`,
    ...(diameterMm === undefined ? ['', ''] : [errors(diameterMm, 3), percent(diameterMm.covered)]),
    errors(lumenHu, 1),
    percent(lumenHu.covered),
  ];
  return `| ${cells.join(' | ')} |`;
}

function errors({ values, median, most95 }: Accuracy, digits: number): string {
  return values === 0 ? '' : `${median.toFixed(digits)}, ${most95.toFixed(digits)}`;
}

/** A part as a whole number of hundredths; nothing where there is none. */
export function percent(part: number): string {
  return Number.isNaN(part) ? '' : `${(100 * part).toFixed(0)} %`;
}

/** How often each reason was given. */
export function reasonsInWords(refused: Readonly<Record<string, number>>): string {
  const all = Object.entries(refused).map(([code, count]) => `${count} ${code}`);
  return all.length === 0 ? 'none' : all.join(', ');
}
