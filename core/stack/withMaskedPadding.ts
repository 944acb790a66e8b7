import type { PixelEncoding } from '../dicom/index.js';
import { type Result, refuse, success } from '../result.js';
import type { Stack } from './stack.js';

/**
 * The stack with all values below a HU taken as no image, because the reader chose so (AWKWARD row 55): they are then
 * padding like that which files mark themselves, in no measurement and drawn as no data. A finding says so wherever
 * the stack is spoken of. The stack itself is not changed; one that is masked alike already is returned as it is.
 *
 * Refused without HU, where another value is masked already, and where a file marks padding that leaves a gap to the
 * masked values: padding is one range.
 */
export function withMaskedPadding(stack: Stack, belowHu: number): Result<Stack> {
  if (stack.maskedBelowHu === belowHu) return success(stack);
  if (stack.maskedBelowHu !== undefined) {
    throw new Error(`stack is masked already: ${stack.maskedBelowHu}`);
  }
  if (stack.unit !== 'HU') {
    return refuse(
      'no-mask',
      `The values of this stack are “${stack.unit}”, not HU: nothing of them can be left out.`,
    );
  }
  // Slices share what they have in common; so do masked ones.
  const known = new Map<PixelEncoding, PixelEncoding>();
  for (const { image } of stack.slices) {
    if (known.has(image.pixels)) continue;
    const masked = withMask(image.pixels, belowHu);
    if (masked === undefined) {
      return refuse(
        'no-mask',
        'The files mark other values as padding, beside those to be left out. These can’t be left out too: keep regions off the border of the scan.',
      );
    }
    known.set(image.pixels, masked);
  }
  const [first, ...rest] = stack.slices.map((slice) => ({
    ...slice,
    image: { ...slice.image, pixels: known.get(slice.image.pixels) ?? slice.image.pixels },
  }));
  if (first === undefined) throw new RangeError('a stack without slices');
  return success({
    ...stack,
    slices: [first, ...rest],
    maskedBelowHu: belowHu,
    findings: [
      ...stack.findings,
      {
        code: 'masked-padding',
        text: `Values below ${String(belowHu).replace('-', '−')} HU are left out as no image: the files do not mark them, the reader chose it.`,
      },
    ],
  });
}

/** The encoding with the stored values of less than a HU as padding; undefined where that would not be one range. */
function withMask(pixels: PixelEncoding, belowHu: number): PixelEncoding | undefined {
  const { rescale, padding, signed, bitsStored } = pixels;
  if (rescale === undefined) return undefined;
  const least = signed ? -(2 ** (bitsStored - 1)) : 0;
  const most = least + 2 ** bitsStored - 1;
  // The stored value, not a whole number, at which the HU begin to count.
  const limit = (belowHu - rescale.intercept) / rescale.slope;
  const [low, high] =
    rescale.slope > 0 ? [least, Math.ceil(limit) - 1] : [Math.floor(limit) + 1, most];
  const masked = { low: Math.max(low, least), high: Math.min(high, most) };
  if (masked.low > masked.high) return pixels;
  if (padding === undefined) return { ...pixels, padding: masked };
  const areOneRange = padding.low <= masked.high + 1 && masked.low <= padding.high + 1;
  if (!areOneRange) return undefined;
  return {
    ...pixels,
    padding: {
      low: Math.min(padding.low, masked.low),
      high: Math.max(padding.high, masked.high),
    },
  };
}
