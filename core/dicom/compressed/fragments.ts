import { type Result, refuse, success } from '../../result.js';

const ITEM = 0xfffee000;
const SEQUENCE_END = 0xfffee0dd;

/** Encapsulated Pixel Data: the basic offset table and the fragments (PS3.5 A.4). */
export interface Fragments {
  /** Offsets of the frames from the first byte of the first item after the table; empty when the file has none. */
  readonly offsets: readonly number[];
  readonly fragments: readonly { readonly at: number; readonly bytes: Uint8Array }[];
}

/**
 * Walks the items of encapsulated Pixel Data. It ends at the delimiter, or at the end of the file when only the
 * delimiter is missing; an item that reaches past the end refuses.
 *
 * @param start offset of the first item
 */
export function readFragments(bytes: Uint8Array, start: number): Result<Fragments> {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  const items: { at: number; bytes: Uint8Array }[] = [];
  let at = start;
  while (at + 8 <= bytes.length) {
    const tag = view.getUint16(at, true) * 0x10000 + view.getUint16(at + 2, true);
    const length = view.getUint32(at + 4, true);
    if (tag === SEQUENCE_END) break;
    if (tag !== ITEM) {
      return refuse(
        'bad-fragments',
        `Pixel Data can't be read: no fragment begins at byte ${at}.`,
        {
          tag: '(7FE0,0010)',
          offset: at,
        },
      );
    }
    if (length > bytes.length - at - 8) {
      return refuse('cut-pixels', `The file ends at byte ${bytes.length}, inside its pixels.`, {
        tag: '(7FE0,0010)',
        offset: at,
      });
    }
    items.push({ at, bytes: bytes.subarray(at + 8, at + 8 + length) });
    at += 8 + length;
  }
  const [table, ...fragments] = items;
  if (table === undefined) return refuse('bad-fragments', 'Pixel Data has no fragments.');
  return success({ offsets: readOffsets(table.bytes), fragments });
}

function readOffsets(table: Uint8Array): number[] {
  const view = new DataView(table.buffer, table.byteOffset, table.length);
  return Array.from({ length: table.length >> 2 }, (_, index) => view.getUint32(index * 4, true));
}

/**
 * The bytes of one frame. A single frame is all fragments joined; several frames are told apart by the offset
 * table, else by one fragment a frame, else by the end-of-image marks that close their last fragments.
 */
export function frameBytes(
  { offsets, fragments }: Fragments,
  frame: number,
  frames: number,
): Result<Uint8Array> {
  if (frames === 1) return success(join(fragments.map((fragment) => fragment.bytes)));
  const full = fragments.filter((fragment) => fragment.bytes.length > 0);
  const origin = fragments[0]?.at ?? 0;
  const from = offsets[frame];
  if (offsets.length === frames && from !== undefined) {
    const to = offsets[frame + 1] ?? Infinity;
    const part = full.filter(({ at }) => at - origin >= from && at - origin < to);
    if (part.length > 0) return success(join(part.map((fragment) => fragment.bytes)));
  }
  if (full.length === frames) return success(full[frame]?.bytes ?? new Uint8Array(0));
  const groups = splitAtImageEnds(full.map((fragment) => fragment.bytes));
  const group = groups[frame];
  if (groups.length < frames || group === undefined) {
    return refuse(
      'frame-missing',
      `Frame ${frame + 1} can't be told from ${full.length} fragments of ${frames} frames.`,
      { tag: '(7FE0,0010)' },
    );
  }
  return success(join(group));
}

/** Groups of fragments, each closed by one that ends in an end-of-image mark: FFD9 of JPEG and JPEG 2000. */
function splitAtImageEnds(fragments: readonly Uint8Array[]): Uint8Array[][] {
  const groups: Uint8Array[][] = [];
  let group: Uint8Array[] = [];
  for (const fragment of fragments) {
    group.push(fragment);
    if (endsImage(fragment)) {
      groups.push(group);
      group = [];
    }
  }
  return groups;
}

/** True when bytes end in FFD9, padding apart. A code stream that does not is cut. */
export function endsImage(bytes: Uint8Array): boolean {
  for (let end = bytes.length; end > Math.max(1, bytes.length - 4); end--) {
    if (bytes[end - 2] === 0xff && bytes[end - 1] === 0xd9) return true;
  }
  return false;
}

function join(parts: readonly Uint8Array[]): Uint8Array {
  const [only] = parts;
  if (parts.length === 1 && only !== undefined) return only;
  const whole = new Uint8Array(parts.reduce((sum, part) => sum + part.length, 0));
  let at = 0;
  for (const part of parts) {
    whole.set(part, at);
    at += part.length;
  }
  return whole;
}
