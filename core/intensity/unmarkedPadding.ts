import type { PixelEncoding, StoredValues } from '../dicom/index.js';
import type { Finding } from '../result.js';
import { isPadding, rescaled } from './hounsfield.js';

/**
 * No tissue, no air and no undershoot of a kernel is so low, HU; scanners write −2000 or −3024 outside their circle.
 * Common practice, no source.
 */
export const LOWEST_IMAGE_HU = -1500;

/**
 * Says how many pixels look like padding that the file does not mark (AWKWARD row 55). They are not taken away:
 * that would change numbers by a guess.
 */
export function unmarkedPadding(stored: StoredValues, pixels: PixelEncoding): Finding | undefined {
  if (pixels.unit !== 'HU') return undefined;
  let count = 0;
  for (const value of stored) {
    if (rescaled(value, pixels) < LOWEST_IMAGE_HU && !isPadding(value, pixels)) count++;
  }
  if (count === 0) return undefined;
  return {
    code: 'unmarked-padding',
    text: `${count} pixel(s) lie below ${LOWEST_IMAGE_HU} HU and are no image, though the file does not mark them: keep regions off the border of the scan.`,
  };
}
