import { type Code, dcm, sct, ucum } from './code.js';
import { OWN } from './ownCodes.js';

/** How a quantity of the measurement table is written as a NUM: its name and, for a statistic of pixels, its modifier. */
export interface QuantityCode {
  readonly name: Code;
  /** Derivation (121401 DCM) by CID 7464. */
  readonly derivation?: Code;
}

const ATTENUATION = dcm('112031', 'Attenuation Coefficient');

/**
 * Codes of the quantities, by their names in the table. Published ones are of CID 7469 (quantity) and CID 7464
 * (statistic), as the dictionary of pydicom 2.3.1 lists them; it has none for CNR, pixel count and the two errors.
 */
export const QUANTITY_CODES: Readonly<Record<string, QuantityCode>> = {
  mean: { name: ATTENUATION, derivation: sct('373098007', 'Mean') },
  SD: { name: ATTENUATION, derivation: sct('386136009', 'Standard Deviation') },
  median: { name: ATTENUATION, derivation: sct('373099004', 'Median') },
  minimum: { name: ATTENUATION, derivation: sct('255605001', 'Minimum') },
  maximum: { name: ATTENUATION, derivation: sct('56851009', 'Maximum') },
  n: { name: OWN.pixelCount },
  area: { name: sct('131184002', 'Area of defined region') },
  'sampled area': { name: OWN.sampledArea },
  SNR: { name: dcm('113060', 'Signal to noise') },
  CNR: { name: OWN.cnr },
  'standard error': { name: OWN.standardError },
  placement: { name: OWN.placement },
};

const UNITS: Readonly<Record<string, Code>> = {
  HU: ucum("[hnsf'U]", 'Hounsfield unit'),
  'mm²': ucum('mm2', 'square millimeter'),
  mm: ucum('mm', 'millimeter'),
  kV: ucum('kV', 'kilovolt'),
  '%': ucum('%', 'percent'),
  px: ucum('{pixels}', 'pixels'),
  '': ucum('{ratio}', 'ratio'),
};

/** The UCUM code of a unit of the table. One that is not known (an odd Rescale Type) is "no units", and its name stays in the remarks. */
export function unitCode(unit: string): Code {
  return UNITS[unit] ?? ucum('1', 'no units');
}
