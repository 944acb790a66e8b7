import type { BandTable } from '../bandTable.js';

/** One threshold: below 30 HU counts as low attenuation. Whole CT numbers: up to and with 29. */
export const LOW_ATTENUATION: BandTable = {
  id: 'low-attenuation',
  name: 'Low attenuation below 30 HU',
  fromHu: null,
  bands: [
    { name: 'below 30 HU', toHu: 29 },
    { name: '30 HU and above', toHu: null },
  ],
  kvp: [100, 120],
  source:
    'Consensus of the Asian Society of Cardiovascular Imaging, PMC10973734: holds at 100 to 120 kV',
};
