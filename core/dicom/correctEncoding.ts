import type { Finding } from '../result.js';
import type { CodeStreamHeader } from './compressed/codeStreamHeader.js';
import type { PixelEncoding } from './ctImage.js';

/**
 * Precision and sign as the code stream has them, not as the tags say (AWKWARD row 76). The stream's sign counts when
 * it says signed; an unsigned JPEG 2000 stream under a signed header holds two's complement words of its precision,
 * as archives write them.
 *
 * @returns undefined when header and code stream agree
 */
export function correctEncoding(
  pixels: PixelEncoding,
  header: CodeStreamHeader,
): { readonly pixels: PixelEncoding; readonly finding: Finding } | undefined {
  const { bitsPerSample } = header;
  if (bitsPerSample > 16 || bitsPerSample < 1) return undefined;
  const signed = header.signed === true || pixels.signed;
  const signDiffers = header.signed !== undefined && header.signed !== pixels.signed;
  // Writers pad words: a stream of 16 bits may carry 12 stored ones, and the stored ones are right.
  const bitsDiffer =
    bitsPerSample < pixels.bitsStored || (signDiffers && bitsPerSample !== pixels.bitsStored);
  if (!bitsDiffer && !signDiffers) return undefined;
  const { padding } = pixels;
  const word = (value: number) => (signed ? (value << 16) >> 16 : value);
  return {
    pixels: {
      ...pixels,
      signed,
      bitsStored: bitsPerSample,
      highBit: bitsPerSample - 1,
      // The padding was read with the sign of the tags.
      ...(padding && {
        padding: {
          low: Math.min(word(padding.low), word(padding.high)),
          high: Math.max(word(padding.low), word(padding.high)),
        },
      }),
    },
    finding: {
      code: 'code-stream-differs',
      text: `The compressed pixels have ${bitsPerSample} bits, ${signed ? 'signed' : 'unsigned'}; the header says otherwise and was corrected.`,
    },
  };
}
