import type { PixelEncoding } from '../dicom/index.js';

/** The values of a cut as a slice would hold them. */
export interface StoredCut {
  readonly stored: Int16Array;
  readonly pixels: PixelEncoding;
}

/** The stored value of a place without a value; it is marked as padding. */
const NOTHING = -32768;

/**
 * Steps of the values, HU, and the HU of stored 0; the finest that holds all values of the cut is taken. The first holds
 * −2047.875 to 6143.875 HU, which is all of a usual image; the others are for metal on an extended scale.
 */
const STEPS = [
  { slope: 1 / 8, intercept: 2048 },
  { slope: 1 / 2, intercept: 14336 },
  { slope: 4, intercept: 126976 },
] as const;

const LARGEST = 32767;

/**
 * A cut as stored values of 16 bits with a rescale, rounded to the nearest eighth of a HU: at most 0.0625 HU from the value
 * that was interpolated, which adds 0.036 HU to an SD by the root of the squares (step/√12). Places without a value are
 * padding: they are in no statistics and are drawn as no image. Everything that reads slices can read it.
 */
export function storedOfCut(hu: Float32Array): StoredCut {
  let [least, most] = [0, 0];
  for (let index = 0; index < hu.length; index++) {
    const value = hu[index] as number;
    if (value < least) least = value;
    if (value > most) most = value;
  }
  const fits = ({ slope, intercept }: { readonly slope: number; readonly intercept: number }) =>
    Math.round((least - intercept) / slope) >= -LARGEST &&
    Math.round((most - intercept) / slope) <= LARGEST;
  const rescale = STEPS.find(fits);
  if (rescale === undefined) throw new RangeError(`invalid HU in a cut: ${least} to ${most}`);
  const { slope, intercept } = rescale;
  const perHu = 1 / slope;
  const stored = new Int16Array(hu.length);
  for (let index = 0; index < hu.length; index++) {
    const value = hu[index] as number;
    stored[index] = Number.isNaN(value) ? NOTHING : Math.floor((value - intercept) * perHu + 0.5);
  }
  return {
    stored,
    pixels: {
      bitsAllocated: 16,
      bitsStored: 16,
      highBit: 15,
      signed: true,
      photometric: 'MONOCHROME2',
      rescale,
      unit: 'HU',
      padding: { low: NOTHING, high: NOTHING },
    },
  };
}
