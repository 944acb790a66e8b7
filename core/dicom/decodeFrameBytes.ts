import { type Result, refuse, success } from '../result.js';
import type { Codecs } from './compressed/codecs.js';
import { decodeFrame } from './compressed/decodeFrame.js';
import type { CtImage } from './ctImage.js';
import { type StoredValues, storedValues } from './storedValues.js';
import { isNative, TRANSFER_SYNTAX, transferSyntaxInWords } from './uids.js';

/**
 * Stored values of one frame from its encoded bytes alone, with what the index says of it. Bytes that are too few
 * refuse; nothing is ever filled up.
 */
export async function decodeFrameBytes(
  bytes: Uint8Array,
  image: CtImage,
  codecs?: Codecs | undefined,
): Promise<Result<StoredValues>> {
  const { grid, pixels, transferSyntaxUid } = image;
  if (isNative(transferSyntaxUid)) {
    const size = grid.rows * grid.columns * 2;
    if (bytes.length < size) {
      return refuse('cut-pixels', `The slice has ${bytes.length} bytes; ${size} are needed.`);
    }
    const bigEndian = transferSyntaxUid === TRANSFER_SYNTAX.explicitBigEndian;
    return success(storedValues(bytes.subarray(0, size), pixels, bigEndian));
  }
  if (codecs === undefined) {
    return refuse(
      'no-decoder',
      `There is no decoder for ${transferSyntaxInWords(transferSyntaxUid)} here.`,
    );
  }
  return decodeFrame(bytes, grid, pixels, transferSyntaxUid, codecs);
}
