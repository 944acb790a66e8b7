import { FOUR_CLASSES } from './bands/fourClasses.js';
import { LOW_ATTENUATION } from './bands/lowAttenuation.js';
import { SIX_CLASSES } from './bands/sixClasses.js';
import type { BandTable } from './bandTable.js';

/** All tables that a reader can choose from; the first is the default. */
export const BAND_TABLES: readonly BandTable[] = [SIX_CLASSES, FOUR_CLASSES, LOW_ATTENUATION];

export type BandTableId = 'six-classes' | 'four-classes' | 'low-attenuation';

/** The table with this identifier; undefined for one that this version does not know. */
export function bandTable(id: string): BandTable | undefined {
  return BAND_TABLES.find((table) => table.id === id);
}

/** Text of a band's edges as whole CT numbers: '76 to 130 HU'. */
export function bandEdges(table: BandTable, index: number): string {
  const band = table.bands[index];
  const below = index === 0 ? table.fromHu : (table.bands[index - 1]?.toHu ?? null);
  if (band === undefined) throw new RangeError(`invalid band: ${index}`);
  const from = below === null ? null : index === 0 ? below : below + 1;
  const text = (hu: number): string => String(hu).replace('-', '−');
  if (from === null) return band.toHu === null ? 'all' : `up to ${text(band.toHu)} HU`;
  if (band.toHu === null) return `from ${text(from)} HU`;
  return `${text(from)} to ${text(band.toHu)} HU`;
}
