import { type Refusal, type Result, refuse, success } from '../../result.js';
import type { ElementPlace } from '../dataSet.js';

const ITEM = 0xfffee000;
const SEQUENCE_END = 0xfffee0dd;

/** Bytes that hold an end-of-image mark and what may pad it. */
const TAIL_BYTES = 4;

/** A walk through a file that asks for bytes and is given them, so that whoever has the file may read it as it likes. */
export type ByteWalk<T> = Generator<ElementPlace, T, Uint8Array>;

/** Encapsulated Pixel Data: the basic offset table and where the fragments stand (PS3.5 A.4). */
export interface Fragments {
  /** Where the first item behind the offset table begins: offsets count from here. */
  readonly origin: number;
  /** Offsets of the frames; empty when the file has none. */
  readonly offsets: readonly number[];
  /** `at` is the item's own beginning, `offset` that of its bytes. */
  readonly fragments: readonly (ElementPlace & { readonly at: number })[];
  /** Why the walk stopped before the end of Pixel Data, and where; what stands before it is whole. */
  readonly stopped?: Refusal & { readonly offset: number };
}

/**
 * Walks the items of encapsulated Pixel Data. It ends at the delimiter, or at the end of the file when only the
 * delimiter is missing.
 *
 * @param start offset of the first item
 * @param size of the file
 */
export function* walkFragments(start: number, size: number): ByteWalk<Result<Fragments>> {
  const items: { at: number; offset: number; length: number }[] = [];
  let stopped: Fragments['stopped'];
  let at = start;
  while (at + 8 <= size) {
    const head = yield { offset: at, length: 8 };
    const view = new DataView(head.buffer, head.byteOffset, head.length);
    const tag = view.getUint16(0, true) * 0x10000 + view.getUint16(2, true);
    const length = view.getUint32(4, true);
    if (tag === SEQUENCE_END) break;
    if (tag !== ITEM || length > size - at - 8) {
      const [code, text] =
        tag === ITEM
          ? ['cut-pixels', `The file ends at byte ${size}, inside its pixels.`]
          : ['bad-fragments', `Pixel Data can't be read: no fragment begins at byte ${at}.`];
      stopped = { code: code ?? '', text: text ?? '', tag: '(7FE0,0010)', offset: at };
      break;
    }
    items.push({ at, offset: at + 8, length });
    at += 8 + length;
  }
  const [table, ...fragments] = items;
  if (table === undefined) {
    return stopped === undefined
      ? refuse('bad-fragments', 'Pixel Data has no fragments.')
      : { ok: false, refusal: stopped };
  }
  const offsets = table.length === 0 ? [] : readOffsets(yield table);
  const origin = table.offset + table.length;
  return success({ origin, offsets, fragments, ...(stopped && { stopped }) });
}

function readOffsets(table: Uint8Array): number[] {
  const view = new DataView(table.buffer, table.byteOffset, table.length);
  return Array.from({ length: table.length >> 2 }, (_, index) => view.getUint32(index * 4, true));
}

/** Which of the fragments end in an end-of-image mark. */
export function* walkEnds({ fragments }: Fragments): ByteWalk<readonly boolean[]> {
  const ends: boolean[] = [];
  for (const { offset, length } of fragments) {
    const tail = Math.min(TAIL_BYTES, length);
    ends.push(tail > 0 && endsImage(yield { offset: offset + length - tail, length: tail }));
  }
  return ends;
}

/** True when bytes end in FFD9, padding apart. A code stream that does not is cut. */
export function endsImage(bytes: Uint8Array): boolean {
  for (let end = bytes.length; end > Math.max(1, bytes.length - TAIL_BYTES + 1); end--) {
    if (bytes[end - 2] === 0xff && bytes[end - 1] === 0xd9) return true;
  }
  return false;
}
