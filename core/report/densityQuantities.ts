import { formatFixed } from '../format/index.js';
import type { Density } from '../note/schema.js';
import { bandEdges, bandShare, bandTable } from '../plaque/index.js';
import type { QuantityValue } from './quantityDefinition.js';

/** Names of band shares begin with this. */
export const BAND_SHARE = 'share of ';

/** Shares of a plaque in the bands of its table, in percent of its pixels, each with band, edges and source. */
export function densityQuantities(density: Density | undefined): readonly QuantityValue[] {
  const table = density && bandTable(density.table);
  if (density === undefined || table === undefined) return [];
  const share = (name: string, value: number | undefined, edges: string): QuantityValue => ({
    quantity: `${BAND_SHARE}${name}`,
    value: value === undefined ? null : 100 * value,
    printed: printedShare(value === undefined ? null : 100 * value),
    unit: '%',
    formula: `pixels of ${edges} / n; ${table.name}: ${table.source}`,
  });
  return [
    ...table.bands.map(({ name }, band) =>
      share(name, bandShare(density, band), bandEdges(table, band)),
    ),
    ...(density.unassigned === 0
      ? []
      : [share('no band', density.unassigned / density.n, `below ${table.fromHu ?? 0} HU`)]),
  ];
}

/** A share as it is printed everywhere, in percent. */
export function printedShare(percent: number | null): string {
  return formatFixed(percent, 1);
}
