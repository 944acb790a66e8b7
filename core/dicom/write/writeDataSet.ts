import { type ByteSink, byteSink } from './byteSink.js';
import type { EncapsulatedElement, SequenceElement, WriteElement } from './element.js';
import type { Encoding } from './encoding.js';
import { valueBytes } from './valueBytes.js';

const ITEM = 0xfffee000;
const ITEM_END = 0xfffee00d;
const SEQUENCE_END = 0xfffee0dd;
const UNDEFINED = 0xffffffff;

/** VRs whose explicit header has two spare bytes and a length of 32 bits (PS3.5 table 7.1-1). */
const LONG_FORM = new Set(['OB', 'OD', 'OF', 'OL', 'OV', 'OW', 'SQ', 'UC', 'UN', 'UR', 'UT']);

/**
 * Elements as the bytes of a data set (PS3.5 section 7), in ascending order of tags whatever order they come in.
 * Throws for a tag that comes twice, and for a value that is too long for its VR's length field.
 */
export function writeDataSet(elements: readonly WriteElement[], encoding: Encoding): Uint8Array {
  const sink = byteSink(encoding.littleEndian);
  let previous = -1;
  for (const element of [...elements].sort((a, b) => a.tag - b.tag)) {
    if (element.tag === previous) throw new RangeError(`tag comes twice: ${tagText(element.tag)}`);
    previous = element.tag;
    writeElement(sink, element, encoding);
  }
  return sink.take();
}

function writeElement(sink: ByteSink, element: WriteElement, encoding: Encoding): void {
  if ('items' in element) writeSequence(sink, element, encoding);
  else if ('fragments' in element) writeFragments(sink, element, encoding);
  else {
    const bytes = valueBytes(element, encoding.littleEndian);
    writeHeader(sink, element, bytes.length, encoding);
    sink.bytes(bytes);
  }
}

function writeSequence(sink: ByteSink, element: SequenceElement, encoding: Encoding): void {
  const open = element.undefinedLength === true;
  const items = element.items.map((item) => writeDataSet(item, encoding));
  const length = items.reduce((sum, item) => sum + 8 + item.length, 0);
  writeHeader(sink, element, open ? UNDEFINED : length, encoding);
  for (const item of items) {
    writeTag(sink, ITEM);
    sink.u32(open ? UNDEFINED : item.length);
    sink.bytes(item);
    if (open) writeMark(sink, ITEM_END);
  }
  if (open) writeMark(sink, SEQUENCE_END);
}

function writeFragments(sink: ByteSink, element: EncapsulatedElement, encoding: Encoding): void {
  writeHeader(sink, element, UNDEFINED, encoding);
  for (const fragment of [element.offsetTable ?? new Uint8Array(0), ...element.fragments]) {
    const odd = fragment.length % 2;
    writeTag(sink, ITEM);
    sink.u32(fragment.length + odd);
    sink.bytes(fragment);
    if (odd === 1) sink.bytes(Uint8Array.of(0));
  }
  writeMark(sink, SEQUENCE_END);
}

function writeMark(sink: ByteSink, tag: number): void {
  writeTag(sink, tag);
  sink.u32(0);
}

function writeTag(sink: ByteSink, tag: number): void {
  sink.u16(tag >>> 16);
  sink.u16(tag & 0xffff);
}

function writeHeader(
  sink: ByteSink,
  { tag, vr }: { readonly tag: number; readonly vr: string },
  length: number,
  { explicitVr }: Encoding,
): void {
  writeTag(sink, tag);
  if (!explicitVr) {
    sink.u32(length);
    return;
  }
  sink.bytes(Uint8Array.of(vr.charCodeAt(0), vr.charCodeAt(1)));
  if (LONG_FORM.has(vr)) {
    sink.u16(0);
    sink.u32(length);
    return;
  }
  if (length > 0xfffe)
    throw new RangeError(`value too long for ${vr} in ${tagText(tag)}: ${length} bytes`);
  sink.u16(length);
}

function tagText(tag: number): string {
  const digits = tag.toString(16).padStart(8, '0');
  return `(${digits.slice(0, 4)},${digits.slice(4)})`;
}
