import type { PixelEncoding } from '../dicom/index.js';

/** True for a stored value that is padding: no image, in no statistics (PS3.3 C.7.5.1.1.2, inclusive range). */
export function isPadding(stored: number, { padding }: PixelEncoding): boolean {
  return padding !== undefined && stored >= padding.low && stored <= padding.high;
}

/**
 * Output of the Modality LUT: slope · stored + intercept, or the table's value (PS3.3 C.11.1); the stored value itself
 * where the file has neither.
 */
export function rescaled(stored: number, { rescale, modalityLut }: PixelEncoding): number {
  if (rescale !== undefined) return stored * rescale.slope + rescale.intercept;
  if (modalityLut === undefined) return stored;
  const { firstStored, values } = modalityLut;
  const entry = Math.min(values.length - 1, Math.max(0, Math.round(stored) - firstStored));
  return values[entry] ?? stored;
}

/** HU of a stored value; undefined for padding and where the file gives no HU. */
export function storedToHu(stored: number, pixels: PixelEncoding): number | undefined {
  if (pixels.unit !== 'HU' || isPadding(stored, pixels)) return undefined;
  return rescaled(stored, pixels);
}

/** HU from linear attenuation coefficients: 1000 (μ − μwater) / μwater. */
export function attenuationToHu(mu: number, muWater: number): number {
  return (1000 * (mu - muWater)) / muWater;
}
