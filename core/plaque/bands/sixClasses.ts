import type { BandTable } from '../bandTable.js';

/** Edges as published: −30 to 75, 76 to 130, 131 to 350, 351 to 700, 701 to 1000, above 1000 HU. */
export const SIX_CLASSES: BandTable = {
  id: 'six-classes',
  name: 'Six classes',
  fromHu: -30,
  bands: [
    { name: 'low attenuation', toHu: 75 },
    { name: 'fibro-fatty', toHu: 130 },
    { name: 'fibrous', toHu: 350 },
    { name: 'low-density calcium', toHu: 700 },
    { name: 'high-density calcium', toHu: 1000 },
    { name: 'calcium above 1000 HU', toHu: null },
  ],
  kvp: [],
  source:
    'van Rosendael 2021, JAMA Cardiol (first author from memory); tube voltage not stated there',
};
