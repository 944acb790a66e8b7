import { type Result, refuse, success } from '../../core/result.js';
import type { Stack } from '../../core/stack/index.js';

/** A view of one slice in the volume's buffer, which may be shared. */
export type StoredSlice = Int16Array<ArrayBufferLike> | Uint16Array<ArrayBufferLike>;

/**
 * The stored values of one stack, 16 bit, slice after slice in one buffer. The buffer is shared with the
 * workers where the page is cross-origin isolated. It lives beside the store, which holds plain data only.
 */
export interface Volume {
  readonly stack: Stack;
  readonly buffer: ArrayBuffer | SharedArrayBuffer;
  /** Pixels of one slice. */
  readonly slicePixels: number;
  /** The stored values of a slice; undefined until it has been read. The same view at each call. */
  slice(index: number): StoredSlice | undefined;
  /** Says that a slice's values are in the buffer now. */
  markRead(index: number): StoredSlice;
}

const BYTES_PER_PIXEL = 2;

/** Makes room for a stack. Refuses when there is not enough memory. */
export function createVolume(stack: Stack): Result<Volume> {
  const { rows, columns } = stack.slices[0].image.grid;
  const slicePixels = rows * columns;
  const bytes = slicePixels * stack.slices.length * BYTES_PER_PIXEL;
  const room = allocate(bytes);
  if (room === undefined) {
    const gigabytes = (bytes / 2 ** 30).toFixed(1);
    return refuse(
      'no-memory',
      `This stack needs ${gigabytes} GB of memory, which is not free. Close other programs, or open a smaller stack.`,
    );
  }
  const views = new Map<number, StoredSlice>();
  return success({
    stack,
    buffer: room,
    slicePixels,
    slice: (index) => views.get(index),
    markRead: (index) => {
      const known = views.get(index);
      if (known !== undefined) return known;
      const slice = stack.slices[index];
      if (slice === undefined) throw new RangeError(`invalid slice index: ${index}`);
      const offset = index * slicePixels * BYTES_PER_PIXEL;
      const view = slice.image.pixels.signed
        ? new Int16Array(room, offset, slicePixels)
        : new Uint16Array(room, offset, slicePixels);
      views.set(index, view);
      return view;
    },
  });
}

function allocate(bytes: number): ArrayBuffer | SharedArrayBuffer | undefined {
  try {
    return globalThis.crossOriginIsolated === true
      ? new SharedArrayBuffer(bytes)
      : new ArrayBuffer(bytes);
  } catch (error) {
    if (error instanceof RangeError) return undefined;
    throw error;
  }
}

/** Where a slice begins in its volume's buffer, bytes. */
export function sliceOffsetBytes(volume: Volume, index: number): number {
  return index * volume.slicePixels * BYTES_PER_PIXEL;
}
