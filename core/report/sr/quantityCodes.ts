import { type Code, dcm, sct, ucum } from './code.js';
import { OWN } from './ownCodes.js';

/** How a quantity of the measurement table is written as a NUM: its name and, for a statistic of pixels, its modifier. */
export interface QuantityCode {
  readonly name: Code;
  /** Derivation (121401 DCM) by CID 7464. */
  readonly derivation?: Code;
  /** Unit of a number that has none, where it is no ratio. */
  readonly unit?: Code;
}

const NO_UNITS = ucum('1', 'no units');
const ATTENUATION = dcm('112031', 'Attenuation Coefficient');

/**
 * Codes of the quantities, by their names in the table. Published ones are of CID 7469 (quantity) and CID 7464
 * (statistic), as the dictionary of pydicom 2.3.1 lists them; it has none for CNR, pixel count, errors, and for what is
 * defined here alone: edge lines, profiles and fitted stents.
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
  'edge rise': { name: OWN.edgeRise },
  'edge rise standard error': { name: OWN.edgeRiseError },
  'edge crossings': { name: OWN.edgeCrossings },
  'blur FWHM': { name: OWN.blurFwhm },
  'edge step': { name: OWN.edgeStep },
  'edge pixels': { name: OWN.edgePixels },
  'visible width': { name: OWN.visibleWidth },
  'strut peak distance': { name: OWN.strutPeaks },
  'strut width': { name: OWN.strutWidth },
  'inner edge rise': { name: OWN.innerRise },
  'lumen level': { name: OWN.lumenLevel },
  'artificial narrowing': { name: OWN.narrowing },
  'strut diameter': { name: OWN.strutDiameter },
  'strut diameter standard error': { name: OWN.strutDiameterError },
  'strut diameter standard error by refits': { name: OWN.strutDiameterRefits },
  'fitted lumen': { name: OWN.fittedLumen },
  'fitted lumen standard error': { name: OWN.fittedLumenError },
  'fitted lumen standard error by refits': { name: OWN.fittedLumenRefits },
  'wall width': { name: OWN.wallWidth },
  'wall width standard error': { name: OWN.wallWidthError },
  'fitted wall': { name: OWN.fittedWall },
  'fitted wall standard error': { name: OWN.fittedWallError },
  'strut line mass': { name: OWN.strutMass },
  'strut line mass standard error': { name: OWN.strutMassError },
  'shared blur': { name: OWN.sharedBlur },
  'shared blur standard error': { name: OWN.sharedBlurError },
  'chi square': { name: OWN.chiSquare, unit: NO_UNITS },
  'degrees of freedom': { name: OWN.degreesOfFreedom, unit: NO_UNITS },
  tilt: { name: OWN.tilt },
  'fitted slices': { name: OWN.fittedSlices },
  'plain region': { name: OWN.plainRegion },
  'plain region radius': { name: OWN.plainRadius },
  'noise around the stent': { name: OWN.stentNoise },
};

const UNITS: Readonly<Record<string, Code>> = {
  HU: ucum("[hnsf'U]", 'Hounsfield unit'),
  'mm²': ucum('mm2', 'square millimeter'),
  mm: ucum('mm', 'millimeter'),
  kV: ucum('kV', 'kilovolt'),
  '%': ucum('%', 'percent'),
  px: ucum('{pixels}', 'pixels'),
  '°': ucum('deg', 'degree'),
  HU·mm: ucum("[hnsf'U].mm", 'Hounsfield unit times millimeter'),
  slices: ucum('{slices}', 'slices'),
  '': ucum('{ratio}', 'ratio'),
};

/** The UCUM code of a unit of the table. One that is not known (an odd Rescale Type) is "no units", and its name stays in the remarks. */
export function unitCode(unit: string): Code {
  return UNITS[unit] ?? NO_UNITS;
}
