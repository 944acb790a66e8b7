import { type Result, refuse, success } from '../../result.js';
import type { PixelEncoding } from '../ctImage.js';
import { extractStoredBits, type StoredValues } from '../storedValues.js';
import { transferSyntaxInWords } from '../uids.js';
import type { Codecs, CodedImage, FrameDecoder } from './codecs.js';
import { codeStreamOf, readCodeStreamHeader } from './codeStreamHeader.js';
import { endsImage } from './fragments.js';
import { decodeRle } from './rle.js';

const RLE = '1.2.840.10008.1.2.5';

type Loader = (codecs: Codecs) => Promise<FrameDecoder>;

const LOADERS: Readonly<Record<string, Loader>> = {
  '1.2.840.10008.1.2.4.57': (codecs) => codecs.jpegLossless(),
  '1.2.840.10008.1.2.4.70': (codecs) => codecs.jpegLossless(),
  '1.2.840.10008.1.2.4.80': (codecs) => codecs.jpegLs(),
  '1.2.840.10008.1.2.4.81': (codecs) => codecs.jpegLs(),
  '1.2.840.10008.1.2.4.90': (codecs) => codecs.jpeg2000(),
  '1.2.840.10008.1.2.4.91': (codecs) => codecs.jpeg2000(),
  '1.2.840.10008.1.2.4.201': (codecs) => codecs.highThroughputJpeg2000(),
  '1.2.840.10008.1.2.4.202': (codecs) => codecs.highThroughputJpeg2000(),
  '1.2.840.10008.1.2.4.203': (codecs) => codecs.highThroughputJpeg2000(),
};

/** True for a compressed transfer syntax that can be decoded. */
export function canDecode(transferSyntaxUid: string): boolean {
  return transferSyntaxUid === RLE || transferSyntaxUid in LOADERS;
}

/**
 * Decodes one compressed frame to stored values. A code stream that is cut is refused: some decoders would fill
 * the rest with grey and say nothing.
 *
 * @param pixels as the header reading left it: sign and precision already taken from the code stream
 */
export async function decodeFrame(
  frame: Uint8Array,
  size: { readonly rows: number; readonly columns: number },
  pixels: PixelEncoding,
  transferSyntaxUid: string,
  codecs: Codecs,
): Promise<Result<StoredValues>> {
  const count = size.rows * size.columns;
  if (transferSyntaxUid === RLE) {
    const words = decodeRle(frame, count);
    return words.ok ? success(extractStoredBits(words.value, pixels)) : words;
  }
  const load = LOADERS[transferSyntaxUid];
  if (load === undefined) {
    return refuse(
      'unsupported-transfer-syntax',
      `Compressed pixels that can't be read: ${transferSyntaxInWords(transferSyntaxUid)}.`,
    );
  }
  const stream = codeStreamOf(frame);
  if (!endsImage(stream)) {
    return refuse('cut-pixels', 'The compressed pixels are cut: their end mark is missing.');
  }
  const head = readCodeStreamHeader(stream);
  if (head !== undefined && (head.width !== size.columns || head.height !== size.rows)) {
    return refuseSize(head.width, head.height, size);
  }
  if (head?.pointTransform !== undefined) {
    return refuse(
      'unsupported-transfer-syntax',
      'JPEG lossless with dropped low bits (a point transform) can’t be read.',
    );
  }
  const coded = await tryDecode(await load(codecs), stream);
  if (!coded.ok) return coded;
  const { width, height, samples } = coded.value;
  if (width !== size.columns || height !== size.rows || samples.length !== count) {
    return refuseSize(width, height, size);
  }
  const words = new Uint16Array(samples.buffer, samples.byteOffset, samples.length);
  return success(extractStoredBits(words, pixels));
}

/** Said before decoding where the stream's head tells: a decoder makes room for whatever size it is told. */
function refuseSize(
  width: number,
  height: number,
  size: { readonly rows: number; readonly columns: number },
): Result<never> {
  return refuse(
    'code-stream-damaged',
    `The compressed pixels are ${width} × ${height}; the header says ${size.columns} × ${size.rows}.`,
  );
}

/** Decoders throw numbers, strings and errors for damage of the file; that is what they are for. */
async function tryDecode(decode: FrameDecoder, stream: Uint8Array): Promise<Result<CodedImage>> {
  try {
    return success(decode(stream));
  } catch {
    return refuse(
      'code-stream-damaged',
      'The compressed pixels are damaged: they can’t be decoded.',
    );
  }
}
