import type { DataSet, PixelDataPlace } from './dataSet.js';
import { parseDataSet } from './parseDataSet.js';
import { agreesByNumber, vrNumber } from './recover/vr.js';
import { TRANSFER_SYNTAX } from './uids.js';

const PIXEL_DATA = 0x7fe00010;
const TRANSFER_SYNTAX_TAG = 0x00020010;
const ITEM = 0xfffee000;
const ITEM_END = 0xfffee00d;
const SEQUENCE_END = 0xfffee0dd;
const OPEN = 0xffffffff;
const DEEPEST = 16;

/** How the length of a value stands behind its representation (PS3.5 tables 7.1-1 and 7.1-2), by two letters as one number. */
const SHORT = 1;
const LONG = 2;
const SEQUENCE = 3;
const LENGTH_KIND = new Uint8Array(0x10000);
for (const vr of 'AE AS AT CS DA DS DT FL FD IS LO LT PN SH SL SS ST TM UI UL US'.split(' ')) {
  LENGTH_KIND[vrNumber(vr)] = SHORT;
}
for (const vr of 'OB OD OF OL OW UC UN UR UT'.split(' ')) LENGTH_KIND[vrNumber(vr)] = LONG;
LENGTH_KIND[vrNumber('SQ')] = SEQUENCE;

/** The elements of one data set, ascending by tag. */
interface Elements {
  readonly tags: number[];
  readonly offsets: number[];
  readonly lengths: number[];
}

/**
 * Walks through the header of a file that follows the standard to the letter, and makes nothing of elements
 * that nobody asks for: far less work than parsing them, which counts in a folder of thousands of files.
 *
 * @returns what the parser would return; undefined for anything that is not little endian with known value
 *   representations, ascending tags, closed sequences and Pixel Data at the end: then ask the parser
 */
export function walkDataSet(bytes: Uint8Array): DataSet | undefined {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  const elements: Elements = { tags: [], offsets: [], lengths: [] };
  let syntax: string | undefined;
  let explicit = true;
  let before = 0;
  for (let at = 132; at + 8 <= bytes.length; ) {
    const tag = tagAt(view, at);
    if (tag <= before) return undefined;
    before = tag;
    if (syntax === undefined && tag > 0x0002ffff) {
      syntax = syntaxOf(bytes, elements);
      if (syntax === undefined) return undefined;
      explicit = syntax !== TRANSFER_SYNTAX.implicitLittleEndian;
      // What the forgiving reader has to say something about is left to it.
      if (!metaLengthFits(view, elements, at)) return undefined;
      if (!explicit && (LENGTH_KIND[view.getUint16(at + 4)] ?? 0) !== 0) return undefined;
    }
    if (explicit && !agreesByNumber(view.getUint16(at + 4), tag)) return undefined;
    const head = headOf(view, at, explicit);
    if (head === undefined) return undefined;
    if (tag === PIXEL_DATA) {
      if (syntax === undefined || head.kind === SHORT) return undefined;
      const { valueAt: offset, length } = head;
      return walked(bytes, syntax, elements, { offset, length, inFragments: length === OPEN });
    }
    const end = valueEnd(view, head, bytes.length, 0);
    if (end === undefined) return undefined;
    elements.tags.push(tag);
    elements.offsets.push(head.valueAt);
    // An open sequence ends before its delimiter.
    elements.lengths.push(head.length === OPEN ? end - 8 - head.valueAt : head.length);
    at = end;
  }
  return undefined;
}

/** File Meta Information Group Length (0002,0000), where it is the first element, counts to the data set. */
function metaLengthFits(view: DataView, { tags, offsets }: Elements, end: number): boolean {
  const [offset = 0] = offsets;
  return tags[0] !== 0x00020000 || view.getUint32(offset, true) === end - offset - 4;
}

interface Head {
  readonly explicit: boolean;
  readonly kind: number;
  readonly valueAt: number;
  readonly length: number;
}

function tagAt(view: DataView, at: number): number {
  return view.getUint16(at, true) * 0x10000 + view.getUint16(at + 2, true);
}

/** Undefined when the bytes end in it or its value representation is none. @param at at least 8 bytes before the end */
function headOf(view: DataView, at: number, explicit: boolean): Head | undefined {
  if (!explicit) {
    const length = view.getUint32(at + 4, true);
    return { explicit, kind: LONG, valueAt: at + 8, length };
  }
  const kind = LENGTH_KIND[view.getUint16(at + 4)] ?? 0;
  if (kind === SHORT)
    return { explicit, kind, valueAt: at + 8, length: view.getUint16(at + 6, true) };
  if (kind === 0 || at + 12 > view.byteLength) return undefined;
  return { explicit, kind, valueAt: at + 12, length: view.getUint32(at + 8, true) };
}

/** Where a value ends that lies before `limit`, with all that is in it; undefined when it does not, or is odd. */
function valueEnd(view: DataView, head: Head, limit: number, depth: number): number | undefined {
  const { explicit, kind, valueAt, length } = head;
  const isSequence = explicit ? kind === SEQUENCE : beginsWithItem(view, valueAt);
  if (isSequence) {
    const end = length === OPEN ? limit : valueAt + length;
    if (end > limit || depth > DEEPEST) return undefined;
    return sequenceEnd(view, { explicit, start: valueAt, end, open: length === OPEN }, depth);
  }
  if (length === OPEN || length % 2 === 1 || valueAt + length > limit) return undefined;
  return valueAt + length;
}

/** How the parser tells a sequence where representations are not stated. */
function beginsWithItem(view: DataView, at: number): boolean {
  if (at + 4 > view.byteLength) return false;
  const tag = tagAt(view, at);
  return tag === ITEM || tag === SEQUENCE_END;
}

interface Span {
  readonly explicit: boolean;
  readonly start: number;
  readonly end: number;
  readonly open: boolean;
}

function sequenceEnd(
  view: DataView,
  { explicit, start, end, open }: Span,
  depth: number,
): number | undefined {
  let at = start;
  while (open || at < end) {
    if (at + 8 > end) return undefined;
    const tag = tagAt(view, at);
    const length = view.getUint32(at + 4, true);
    if (open && tag === SEQUENCE_END) return length === 0 ? at + 8 : undefined;
    if (tag !== ITEM) return undefined;
    const isOpen = length === OPEN;
    const itemLimit = isOpen ? end : at + 8 + length;
    if (itemLimit > end) return undefined;
    const item = { explicit, start: at + 8, end: itemLimit, open: isOpen };
    const itemEnded = itemEnd(view, item, depth + 1);
    if (itemEnded === undefined) return undefined;
    at = itemEnded;
  }
  return at;
}

function itemEnd(
  view: DataView,
  { explicit, start, end, open }: Span,
  depth: number,
): number | undefined {
  let at = start;
  while (open || at < end) {
    if (at + 8 > end) return undefined;
    const tag = tagAt(view, at);
    if (open && tag === ITEM_END) {
      return view.getUint32(at + 4, true) === 0 ? at + 8 : undefined;
    }
    if (tag >= ITEM) return undefined;
    if (explicit && !agreesByNumber(view.getUint16(at + 4), tag)) return undefined;
    const head = headOf(view, at, explicit);
    const next = head && valueEnd(view, head, end, depth);
    if (next === undefined) return undefined;
    at = next;
  }
  return at;
}

/** The transfer syntax of a file in little endian that is not deflated; undefined for others and none. */
function syntaxOf(bytes: Uint8Array, { tags, offsets, lengths }: Elements): string | undefined {
  const index = tags.indexOf(TRANSFER_SYNTAX_TAG);
  const start = offsets[index];
  const length = lengths[index];
  if (start === undefined || length === undefined || length > 64) return undefined;
  const value = String.fromCharCode(...bytes.subarray(start, start + length));
  const uid = (value.split('\0')[0] ?? '').trim();
  const isOther = uid === TRANSFER_SYNTAX.deflated || uid === TRANSFER_SYNTAX.explicitBigEndian;
  return uid.startsWith(TRANSFER_SYNTAX.implicitLittleEndian) && !isOther ? uid : undefined;
}

function walked(
  bytes: Uint8Array,
  transferSyntaxUid: string,
  { tags, offsets, lengths }: Elements,
  pixelData: PixelDataPlace,
): DataSet {
  return {
    bytes,
    littleEndian: true,
    transferSyntaxUid,
    find: (tag) => {
      const number = tagNumber(tag);
      if (number === PIXEL_DATA) return { offset: pixelData.offset, length: pixelData.length };
      const index = indexOf(tags, number);
      const offset = offsets[index];
      const length = lengths[index];
      return offset === undefined || length === undefined ? undefined : { offset, length };
    },
    // Few files are asked for a sequence; those are parsed for it.
    items: (tag) => {
      if (indexOf(tags, tagNumber(tag)) === -1) return undefined;
      const parsed = parseDataSet(bytes);
      if (!parsed.ok) throw new Error(`walked, but not parsed: ${parsed.refusal.text}`);
      return parsed.value.items(tag);
    },
    pixelData,
    findings: [],
  };
}

/** Place of a number in an ascending list; -1 when it is not there. */
function indexOf(ascending: readonly number[], wanted: number): number {
  let low = 0;
  let high = ascending.length - 1;
  while (low <= high) {
    const middle = (low + high) >> 1;
    const found = ascending[middle] ?? 0;
    if (found === wanted) return middle;
    if (found < wanted) low = middle + 1;
    else high = middle - 1;
  }
  return -1;
}

const numbers = new Map<string, number>();

/** 'x00280010' as a number. The few dozen tags that the bench asks for are remembered. */
function tagNumber(tag: string): number {
  const known = numbers.get(tag);
  if (known !== undefined) return known;
  const number = Number.parseInt(tag.slice(1), 16);
  if (numbers.size < 1000) numbers.set(tag, number);
  return number;
}
