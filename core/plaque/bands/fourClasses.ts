import type { BandTable } from '../bandTable.js';

/** Edges in common use: −30 to 30, 31 to 130, 131 to 350, above 350 HU. */
export const FOUR_CLASSES: BandTable = {
  id: 'four-classes',
  name: 'Four classes',
  fromHu: -30,
  bands: [
    { name: 'necrotic core', toHu: 30 },
    { name: 'fibro-fatty', toHu: 130 },
    { name: 'fibrous', toHu: 350 },
    { name: 'calcified', toHu: null },
  ],
  kvp: [120],
  source:
    'Four-class division of quantitative plaque studies at 120 kV (from memory, no source at hand)',
};
