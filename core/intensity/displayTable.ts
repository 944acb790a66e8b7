import type { PixelEncoding, VoiWindow } from '../dicom/index.js';
import { isPadding, rescaled } from './hounsfield.js';
import { windowed } from './window.js';

/** Grey of pixels that are no image: darker than black of the ground would hide them, so it is a grey of its own. */
export const NO_DATA_GREY = 24;

/**
 * Grey level of every stored value a slice can have, for its rescale and a window: 65,536 bytes indexed by
 * stored value & 0xffff. Rounded to the nearest level; MONOCHROME1 and `inverted` turn light and dark.
 */
export function displayTable(
  pixels: PixelEncoding,
  window: VoiWindow,
  inverted = false,
): Uint8ClampedArray {
  const table = new Uint8ClampedArray(65536);
  const turned = inverted !== (pixels.photometric === 'MONOCHROME1');
  const first = pixels.signed ? -32768 : 0;
  for (let stored = first; stored < first + 65536; stored++) {
    const grey = Math.round(windowed(rescaled(stored, pixels), window));
    table[stored & 0xffff] = turned ? 255 - grey : grey;
  }
  if (pixels.padding !== undefined) {
    for (let stored = pixels.padding.low; stored <= pixels.padding.high; stored++) {
      if (isPadding(stored, pixels)) table[stored & 0xffff] = NO_DATA_GREY;
    }
  }
  return table;
}
