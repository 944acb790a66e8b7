import { type Result, refuse, success } from '../result.js';
import { type ByteWalk, walkFragments } from './compressed/fragments.js';
import { type FramePlaces, walkFrames } from './compressed/framesOfFragments.js';
import type { DataSet } from './dataSet.js';
import type { ImageFile } from './readImage.js';
import { TRANSFER_SYNTAX } from './uids.js';

const RLE = '1.2.840.10008.1.2.5';

/**
 * Where the encoded bytes of each frame of an image file stand. What the walk asks for lies in the same bytes as the
 * data set's offsets: the file, or its inflated form.
 *
 * @param size of those bytes, which may reach further than the data set's
 */
export function* locateFrames(
  dataSet: DataSet,
  { images, inFragments, frameCount }: ImageFile,
  size: number,
): ByteWalk<Result<readonly Result<FramePlaces>[]>> {
  const [{ grid, transferSyntaxUid }] = images;
  const start = dataSet.pixelData?.offset ?? 0;
  if (!inFragments) {
    const length = grid.rows * grid.columns * 2;
    return success(
      Array.from({ length: frameCount }, (_, frame) => {
        const offset = start + frame * length;
        return offset + length <= size
          ? success([{ offset, length }])
          : refuse(
              'cut-pixels',
              `The file ends at byte ${size}; its pixels go on to byte ${offset + length}.`,
            );
      }),
    );
  }
  const found = yield* walkFragments(start, size);
  if (!found.ok) return found;
  const extendedOffsets = readExtendedOffsets(dataSet);
  const hints = {
    frameCount,
    isRle: transferSyntaxUid === RLE,
    ...(extendedOffsets && { extendedOffsets }),
  };
  return success(yield* walkFrames(found.value, hints));
}

/** Extended Offset Table (PS3.3 C.7.6.3.1.8): 64 bits an offset. */
function readExtendedOffsets(dataSet: DataSet): readonly number[] | undefined {
  const place = dataSet.find('x7fe00001');
  if (place === undefined || place.offset + place.length > dataSet.bytes.length) return undefined;
  const { bytes } = dataSet;
  const view = new DataView(bytes.buffer, bytes.byteOffset + place.offset, place.length);
  return Array.from({ length: place.length >> 3 }, (_, index) =>
    Number(view.getBigUint64(index * 8, true)),
  );
}

/** Drives a walk over bytes that are all in memory. */
export function walkBytes<T>(walk: ByteWalk<T>, bytes: Uint8Array): T {
  let step = walk.next();
  while (!step.done) {
    const { offset, length } = step.value;
    step = walk.next(bytes.subarray(offset, offset + length));
  }
  return step.value;
}

/** What the beginning of a file tells of where its frames stand. */
export type FrameWalk = ByteWalk<Result<readonly Result<FramePlaces>[]>>;

/** A deflated file has no frames to point at: its bytes have to be inflated first. */
export function isDeflated({ images }: ImageFile): boolean {
  return images[0].transferSyntaxUid === TRANSFER_SYNTAX.deflated;
}
