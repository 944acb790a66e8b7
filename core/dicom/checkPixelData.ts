import { type Finding, type Result, refuse, success } from '../result.js';
import {
  type CodeStreamHeader,
  codeStreamOf,
  readCodeStreamHeader,
} from './compressed/codeStreamHeader.js';
import type { DataSet } from './dataSet.js';
import { isNative, TRANSFER_SYNTAX, transferSyntaxInWords } from './uids.js';

/** How the pixels of a file are really encoded, as far as its beginning shows. */
export interface CheckedPixels {
  /** As the file says, unless its pixels show that they are not compressed. */
  readonly transferSyntaxUid: string;
  /** Pixels are in fragments, as compressed ones are. */
  readonly inFragments: boolean;
  /** Whole frames that Pixel Data has room for, when they are not compressed; else those stated. */
  readonly framesPresent: number;
  /** Head of the first code stream, when the bytes reach it. */
  readonly codeStream?: CodeStreamHeader;
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
 * Checks Pixel Data against what the header asks for. Pixels that stand in one piece under a compressed transfer
 * syntax are native when their length says so (AWKWARD row 69); more frames than stated are not read, fewer are
 * told (row 65).
 *
 * @param frameBytes of one native frame
 */
export function checkPixelData(
  dataSet: DataSet,
  transferSyntaxUid: string,
  frameBytes: number,
  frameCount: number,
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
  if (pixelData.inFragments) {
    return success(fromFragments(bytes, pixelData.offset, transferSyntaxUid, frameCount));
  }
  const bytesNeeded = frameBytes * frameCount;
  const { length } = pixelData;
  if (compressed && length !== bytesNeeded) {
    return refuse(
      'bad-pixel-data',
      `Pixel Data is in one piece although the file says ${transferSyntaxInWords(transferSyntaxUid)}, and its length fits no native image.`,
      where,
    );
  }
  const framesPresent = Math.min(frameCount, Math.floor(length / frameBytes));
  if (framesPresent === 0) {
    return refuse(
      'short-pixel-data',
      `Pixel Data has ${length} bytes; ${bytesNeeded} are needed.`,
      where,
    );
  }
  const findings: Finding[] = [];
  if (compressed) {
    findings.push({
      code: 'native-pixels',
      text: `The pixels are not compressed although the file says ${transferSyntaxInWords(transferSyntaxUid)}; their length told.`,
    });
  }
  if (length - bytesNeeded >= frameBytes) {
    const more = Math.floor(length / frameBytes) - frameCount;
    findings.push({
      code: 'more-frames',
      text: `Pixel Data holds ${more} more frame(s) than the ${frameCount} stated; they were not read.`,
    });
  }
  return success({
    transferSyntaxUid: compressed ? TRANSFER_SYNTAX.explicitLittleEndian : transferSyntaxUid,
    inFragments: false,
    framesPresent,
    lossy: false,
    findings,
  });
}

function fromFragments(
  bytes: Uint8Array,
  itemsAt: number,
  transferSyntaxUid: string,
  frameCount: number,
): CheckedPixels {
  const codeStream = firstCodeStream(bytes, itemsAt);
  return {
    transferSyntaxUid,
    inFragments: true,
    framesPresent: frameCount,
    ...(codeStream && { codeStream }),
    lossy:
      MAY_BE_LOSSY.has(transferSyntaxUid) ||
      (codeStream?.lossy ?? transferSyntaxUid === NEAR_LOSSLESS),
    findings: [],
  };
}

/** Head of the code stream in the first fragment behind the offset table; undefined when the bytes end before it. */
function firstCodeStream(bytes: Uint8Array, itemsAt: number): CodeStreamHeader | undefined {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  if (itemsAt + 8 > bytes.length) return undefined;
  const fragmentAt = itemsAt + 8 + view.getUint32(itemsAt + 4, true);
  if (fragmentAt + 8 > bytes.length) return undefined;
  return readCodeStreamHeader(codeStreamOf(bytes.subarray(fragmentAt + 8)));
}
