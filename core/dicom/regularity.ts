import type { Element, DataSet as ParsedDataSet } from 'dicom-parser';
import { DEPTH_AT_MOST } from './recover/stepOver.js';
import { agreesWithDictionary, dictionaryVrOfKey, isKnownVr } from './recover/vr.js';

const PIXEL_DATA = 'x7fe00010';
const ITEM_END = 'xfffee00d';
const SEQUENCE_END = 'xfffee0dd';

/** Value representations that the parser gives a 2-byte length, against PS3.5 table 7.1-1. */
const UNKNOWN_TO_PARSER: ReadonlySet<string> = new Set(['OV', 'SV', 'UV']);

/**
 * True when a parsed data set follows the standard in all that the parser lets pass: ends, value representations,
 * lengths, delimiters, depth. Anything else is for the reader that forgives and says so. Without recursion.
 */
export function isRegular({ elements, byteArray }: ParsedDataSet, explicitVr: boolean): boolean {
  let metaEnd = 0;
  const waiting: { elements: ParsedDataSet['elements']; depth: number; explicitVr: boolean }[] = [
    { elements, depth: 0, explicitVr },
  ];
  for (let level = waiting.pop(); level !== undefined; level = waiting.pop()) {
    for (const key in level.elements) {
      const element = level.elements[key];
      if (element === undefined) continue;
      if (element.parser !== undefined) {
        metaEnd = Math.max(metaEnd, element.dataOffset + element.length);
        if (element.vr === undefined || !isKnownVr(element.vr)) return false;
        continue;
      }
      if (key === ITEM_END && level.depth > 0) continue;
      if (key === PIXEL_DATA && level.depth === 0) continue;
      if (!isPlain(key, element, level.explicitVr, byteArray)) return false;
      const { items } = element;
      if (items === undefined) continue;
      if (level.depth >= DEPTH_AT_MOST) return false;
      // In UN of unknown length stands implicit VR.
      const inner = level.explicitVr && element.vr !== 'UN';
      for (const item of items) {
        if (item.dataSet === undefined || !closesItem(item, byteArray)) return false;
        waiting.push({
          elements: item.dataSet.elements,
          depth: level.depth + 1,
          explicitVr: inner,
        });
      }
    }
  }
  const length = elements.x00020000;
  return length === undefined || length.dataOffset + 4 + u32(byteArray, length) === metaEnd;
}

function isPlain(key: string, element: Element, explicitVr: boolean, bytes: Uint8Array): boolean {
  const { vr, length, dataOffset } = element;
  if (key === SEQUENCE_END || key === ITEM_END) return false;
  if (dataOffset + length > bytes.length) return false;
  if (explicitVr) {
    if (vr === undefined || !isKnownVr(vr) || UNKNOWN_TO_PARSER.has(vr)) return false;
    if (!agreesWithDictionary(vr, dictionaryVrOfKey(key))) return false;
  }
  if (element.hadUndefinedLength === true) {
    if (key === PIXEL_DATA) return true;
    const isSequence = vr === 'SQ' || vr === 'UN' || (!explicitVr && key !== PIXEL_DATA);
    return isSequence && isDelimiter(bytes, dataOffset + length, 0xdd);
  }
  if (element.items !== undefined && element.items.length > 0) {
    const last = element.items[element.items.length - 1];
    return last !== undefined && last.dataOffset + last.length === dataOffset + length;
  }
  return (length & 1) === 0;
}

function closesItem(item: Element, bytes: Uint8Array): boolean {
  const end = item.dataOffset + item.length;
  if (item.hadUndefinedLength === true) return isDelimiter(bytes, end - 8, 0x0d);
  return end <= bytes.length;
}

/** FFFE,E00D or FFFE,E0DD with the length 0, in either byte order. */
function isDelimiter(bytes: Uint8Array, at: number, low: number): boolean {
  const isLittle = bytes[at] === 0xfe && bytes[at + 1] === 0xff && bytes[at + 2] === low;
  const isBig = bytes[at] === 0xff && bytes[at + 1] === 0xfe && bytes[at + 3] === low;
  if (!isLittle && !isBig) return false;
  for (let i = at + 4; i < at + 8; i++) if (bytes[i] !== 0) return false;
  return true;
}

function u32(bytes: Uint8Array, { dataOffset }: Element): number {
  const [a = 0, b = 0, c = 0, d = 0] = bytes.subarray(dataOffset, dataOffset + 4);
  return a + b * 0x100 + c * 0x10000 + d * 0x1000000;
}
