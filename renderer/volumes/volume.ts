import { type Result, refuse, success } from '../../core/result.js';
import type { Stack } from '../../core/stack/index.js';

/** A view of the stored values of one slice, whose buffer may be shared. It stays what it is, also after the slice was dropped. */
export type StoredSlice = Int16Array<ArrayBufferLike> | Uint16Array<ArrayBufferLike>;

/**
 * The stored values of one stack, 16 bit, by slice. It lives beside the store, which holds plain data only.
 * A stack that is too large for the memory that may be used is held in part: slices come and go.
 */
export interface Volume {
  readonly stack: Stack;
  /** Pixels of one slice. */
  readonly slicePixels: number;
  /** Slices that it holds at once: all of the stack, or as many as there is room for. */
  readonly capacity: number;
  /** Slices that it holds now. */
  readonly size: number;
  /** The stored values of a slice; undefined until it has been read, and after it was dropped. The same view at each call. */
  slice(index: number): StoredSlice | undefined;
  /** Where a worker may write a slice itself; undefined where it hands over a buffer of its own. */
  target(
    index: number,
  ): { readonly buffer: SharedArrayBuffer; readonly offsetBytes: number } | undefined;
  /** Takes a slice in: its values, or undefined when they were written to its target. */
  receive(index: number, values: ArrayBuffer | undefined): StoredSlice;
  /** Asks for a slice that is not there, once, to measure on it. Without effect where all is read anyway. */
  ask(index: number): void;
  /** Gives a slice up to make room. Only for a volume that does not hold all. */
  drop(index: number): void;
  /** Slices that it holds, in no order. */
  held(): Iterable<number>;
}

/** How much memory a volume may take, and whether it can be shared with the workers. */
export interface VolumeOptions {
  readonly budgetBytes?: number;
  /** Whether the page may share memory with its workers; by default as the browser says. */
  readonly isolated?: boolean;
  /** Hears what slices a volume that is held in part is asked for. */
  readonly onAsk?: (index: number) => void;
}

const BYTES_PER_PIXEL = 2;

/** With fewer slices than this at once nothing can be scrolled. */
const FEWEST = 4;

/** True when a volume holds its whole stack once all is read. */
export function isWhole({ capacity, stack }: Volume): boolean {
  return capacity === stack.slices.length;
}

/**
 * Makes room for a stack: one buffer that is shared with the workers where the page is cross-origin isolated,
 * else a buffer for each slice. A stack over the budget, or over what the browser gives, is held in part.
 * Refused when there is no room for a few slices.
 */
export function createVolume(stack: Stack, options: VolumeOptions = {}): Result<Volume> {
  const { budgetBytes = Infinity, isolated = globalThis.crossOriginIsolated === true } = options;
  const { onAsk = () => {} } = options;
  const { rows, columns } = stack.slices[0].image.grid;
  const sliceBytes = rows * columns * BYTES_PER_PIXEL;
  const bytes = sliceBytes * stack.slices.length;
  if (bytes <= budgetBytes) {
    if (!isolated) return success(volumeOfSlices(stack, stack.slices.length, () => {}));
    const buffer = allocate(bytes, (size) => new SharedArrayBuffer(size));
    if (buffer !== undefined) return success(volumeInOne(stack, buffer));
  }
  const room = Math.min(budgetBytes, roomFor(bytes));
  const capacity = Math.min(stack.slices.length, Math.floor(room / sliceBytes));
  if (capacity >= Math.min(FEWEST, stack.slices.length)) {
    return success(volumeOfSlices(stack, capacity, onAsk));
  }
  return refuse(
    'no-memory',
    'There is not enough free memory for a few slices of this stack. Close other programs and open the folder again.',
  );
}

/** All slices, one after another, in one buffer that the workers write to. */
function volumeInOne(stack: Stack, buffer: SharedArrayBuffer): Volume {
  const slicePixels = buffer.byteLength / BYTES_PER_PIXEL / stack.slices.length;
  const offsetBytes = (index: number): number => index * slicePixels * BYTES_PER_PIXEL;
  const views = new Map<number, StoredSlice>();
  return {
    stack,
    slicePixels,
    capacity: stack.slices.length,
    get size() {
      return views.size;
    },
    slice: (index) => views.get(index),
    target: (index) => ({ buffer, offsetBytes: offsetBytes(index) }),
    receive(index, values) {
      const known = views.get(index);
      if (known !== undefined) return known;
      const offset = offsetBytes(index);
      if (values !== undefined) {
        new Uint16Array(buffer, offset, slicePixels).set(new Uint16Array(values));
      }
      const view = viewOf(stack, index, buffer, offset, slicePixels);
      views.set(index, view);
      return view;
    },
    ask: () => {},
    drop: (index) => {
      throw new RangeError(`invalid drop from a whole volume: ${index}`);
    },
    held: () => views.keys(),
  };
}

/** Each slice in the buffer that its worker handed over. What was dropped is freed once nobody looks at it. */
function volumeOfSlices(stack: Stack, capacity: number, ask: (index: number) => void): Volume {
  const { rows, columns } = stack.slices[0].image.grid;
  const slicePixels = rows * columns;
  const views = new Map<number, StoredSlice>();
  return {
    stack,
    slicePixels,
    capacity,
    get size() {
      return views.size;
    },
    slice: (index) => views.get(index),
    target: () => undefined,
    receive(index, values) {
      if (values === undefined) throw new TypeError(`no values of slice: ${index}`);
      const view = viewOf(stack, index, values, 0, slicePixels);
      views.set(index, view);
      return view;
    },
    ask,
    drop: (index) => {
      views.delete(index);
    },
    held: () => views.keys(),
  };
}

function viewOf(
  stack: Stack,
  index: number,
  buffer: ArrayBufferLike,
  offsetBytes: number,
  pixels: number,
): StoredSlice {
  const slice = stack.slices[index];
  if (slice === undefined) throw new RangeError(`invalid slice index: ${index}`);
  return slice.image.pixels.signed
    ? new Int16Array(buffer, offsetBytes, pixels)
    : new Uint16Array(buffer, offsetBytes, pixels);
}

function allocate<T>(bytes: number, make: (bytes: number) => T): T | undefined {
  try {
    return make(bytes);
  } catch (error) {
    if (error instanceof RangeError) return undefined;
    throw error;
  }
}

/** The part of so many bytes, halved until the browser gives it, that may be used; it is given back at once. */
function roomFor(bytes: number): number {
  for (let size = bytes; size > 1; size = Math.floor(size / 2)) {
    if (allocate(size, (asked) => new ArrayBuffer(asked)) !== undefined) return size;
  }
  return 0;
}
