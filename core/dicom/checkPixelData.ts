import { type Finding, type Result, refuse, success } from '../result.js';
import {
  type CodeStreamHeader,
  codeStreamOf,
  readCodeStreamHeader,
} from './compressed/codeStreamHeader.js';
import type { PixelEncoding } from './ctImage.js';
import type { DataSet } from './dataSet.js';
import { isNative, transferSyntaxInWords } from './uids.js';

/** How the pixels of a file are really encoded, as far as its beginning shows. */
export interface CheckedPixels {
  readonly pixels: PixelEncoding;
  /** Pixels are in fragments, as compressed ones are. */
  readonly inFragments: boolean;
  readonly lossy: boolean;
  readonly findings: readonly Finding[];
}

/** JPEG 2000 that may be cut at any quality even with the reversible wavelet: lossy unless proven otherwise. */
const MAY_BE_LOSSY: ReadonlySet<string> = new Set([
  '1.2.840.10008.1.2.4.91',
  '1.2.840.10008.1.2.4.203',
]);

/** Near-lossless JPEG-LS, when its bound can't be seen. */
const NEAR_LOSSLESS = '1.2.840.10008.1.2.4.81';

/**
 * Checks Pixel Data against what the header asks for. Of compressed pixels the head of the first code stream is
 * read, when the bytes reach it: its precision and sign count, not the tags'.
 *
 * @param bytesNeeded of native pixels, all frames
 */
export function checkPixelData(
  dataSet: DataSet,
  transferSyntaxUid: string,
  pixels: PixelEncoding,
  bytesNeeded: number,
): Result<CheckedPixels> {
  const { pixelData, bytes } = dataSet;
  if (pixelData === undefined) return refuse('no-image', 'No image: the file has no Pixel Data.');
  const where = { tag: '(7FE0,0010)', offset: pixelData.offset };
  const compressed = !isNative(transferSyntaxUid);
  if (!compressed && pixelData.inFragments) {
    return refuse(
      'bad-pixel-data',
      'Pixel Data is in fragments although the file says that it is not compressed.',
      where,
    );
  }
  if (!compressed || !pixelData.inFragments) {
    if (pixelData.length < bytesNeeded) {
      return refuse(
        'short-pixel-data',
        `Pixel Data has ${pixelData.length} bytes; ${bytesNeeded} are needed.`,
        where,
      );
    }
    if (compressed && pixelData.length !== bytesNeeded + (bytesNeeded & 1)) {
      return refuse(
        'bad-pixel-data',
        `Pixel Data is in one piece although the file says ${transferSyntaxInWords(transferSyntaxUid)}, and its length fits no native image.`,
        where,
      );
    }
    const findings = compressed
      ? [
          {
            code: 'native-pixels',
            text: 'The pixels are not compressed although the file says so; their length told.',
          },
        ]
      : [];
    return success({ pixels, inFragments: false, lossy: false, findings });
  }
  const header = firstCodeStream(bytes, pixelData.offset);
  const corrected = header === undefined ? undefined : fromCodeStream(pixels, header);
  return success({
    pixels: corrected ?? pixels,
    inFragments: true,
    lossy:
      MAY_BE_LOSSY.has(transferSyntaxUid) || (header?.lossy ?? transferSyntaxUid === NEAR_LOSSLESS),
    findings:
      corrected === undefined
        ? []
        : [
            {
              code: 'code-stream-differs',
              text: `The compressed pixels have ${corrected.bitsStored} bits, ${corrected.signed ? 'signed' : 'unsigned'}; the header says otherwise and was corrected.`,
            },
          ],
  });
}

/** Head of the code stream in the first fragment behind the offset table; undefined when the bytes end before it. */
function firstCodeStream(bytes: Uint8Array, itemsAt: number): CodeStreamHeader | undefined {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  if (itemsAt + 8 > bytes.length) return undefined;
  const fragmentAt = itemsAt + 8 + view.getUint32(itemsAt + 4, true);
  if (fragmentAt + 8 > bytes.length) return undefined;
  return readCodeStreamHeader(codeStreamOf(bytes.subarray(fragmentAt + 8)));
}

/**
 * Precision and sign as the code stream has them. Its sign counts when it says signed; an unsigned JPEG 2000 stream
 * under a signed header holds two's complement words of its precision, as archives write them.
 *
 * @returns undefined when header and code stream agree
 */
function fromCodeStream(
  pixels: PixelEncoding,
  header: CodeStreamHeader,
): PixelEncoding | undefined {
  const { bitsPerSample } = header;
  if (bitsPerSample > 16 || bitsPerSample < 1) return undefined;
  const signed = header.signed === true || pixels.signed;
  const signDiffers = header.signed !== undefined && header.signed !== pixels.signed;
  // Writers pad words: a stream of 16 bits may carry 12 stored ones, and the stored ones are right.
  const bitsDiffer =
    bitsPerSample < pixels.bitsStored || (signDiffers && bitsPerSample !== pixels.bitsStored);
  if (!bitsDiffer && !signDiffers) return undefined;
  return { ...pixels, signed, bitsStored: bitsPerSample, highBit: bitsPerSample - 1 };
}
