import type { Finding } from '../result.js';
import { binaryNumbers, isBinaryNumber } from './binaryNumbers.js';
import { type CharacterSet, characterSetOf } from './characterSet.js';
import type { DataSet } from './dataSet.js';
import { decimalString, integerString } from './numberStrings.js';
import { dictionaryVrOfKey } from './recover/vr.js';
import { collectTextFindings, type TextFindings } from './textFindings.js';

/** Typed look into a data set's top level. An empty attribute is an absent one, never 0. */
export interface Attributes {
  has(tag: string): boolean;
  /** All values of a character string, trimmed of padding; undefined when there is none. */
  texts(tag: string): readonly string[] | undefined;
  text(tag: string): string | undefined;
  /** Values of a Decimal String; a value that is no number is undefined. */
  decimals(tag: string): readonly (number | undefined)[] | undefined;
  decimal(tag: string): number | undefined;
  integer(tag: string): number | undefined;
  unsignedShort(tag: string): number | undefined;
  signedShort(tag: string): number | undefined;
  unsignedLong(tag: string): number | undefined;
  /** All 16-bit words of a value, unsigned; undefined when there are none. */
  shorts(tag: string): readonly number[] | undefined;
  float(tag: string): number | undefined;
  double(tag: string): number | undefined;
  /** Items of a sequence, in the character set of the data set around them unless they have their own. */
  items(tag: string): readonly Attributes[] | undefined;
  /** What the looks so far put right or left out, in items too. */
  findings(): readonly Finding[];
}

/** What a data set takes from the one around it, or from the reader. */
interface Surroundings {
  readonly characterSet?: CharacterSet;
  readonly findings?: TextFindings;
  /** Read in whatever the file states. */
  readonly chosen?: CharacterSet | undefined;
}

/** @param around of an item: the data set that holds its sequence; else what the reader chose */
export function attributesOf(dataSet: DataSet, around?: Surroundings): Attributes {
  const { bytes, littleEndian } = dataSet;
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  const findings = around?.findings ?? collectTextFindings();
  const chosen = around?.chosen;
  const characterSet = chosen ?? ownCharacterSet() ?? around?.characterSet ?? characterSetOf('');

  function valueBytes(tag: string): Uint8Array | undefined {
    const place = dataSet.find(tag);
    if (place === undefined || place.length === 0 || place.length === 0xffffffff) return undefined;
    return bytes.subarray(place.offset, place.offset + place.length);
  }

  function ownCharacterSet(): CharacterSet | undefined {
    const value = valueBytes('x00080005');
    const stated = value && trimPadding(characterSetOf('').decode(value, false).text);
    if (!stated) return undefined;
    const own = characterSetOf(stated);
    if (own.findings.length > 0) findings.characterSet(own.findings);
    return own;
  }

  /** A number where the standard has it in two to eight bytes; in the file's own form where that is another. */
  function binary(tag: string, size: number, read: (at: number) => number): number | undefined {
    const place = dataSet.find(tag);
    if (place === undefined || place.length === 0xffffffff) return undefined;
    if (place.fileVr !== undefined) return decimals(tag)?.[0];
    const fits = place.length >= size && place.offset + size <= bytes.length;
    return fits ? read(place.offset) : undefined;
  }

  function whole(tag: string, size: number, least: number, read: (at: number) => number) {
    const value = binary(tag, size, read);
    const fits = value !== undefined && Number.isInteger(value) && value >= least;
    return fits && value < least + 2 ** (size * 8) ? value : undefined;
  }

  function decode(tag: string, value: Uint8Array): string {
    const fileVr = dataSet.find(tag)?.fileVr;
    if (fileVr !== undefined && isBinaryNumber(fileVr)) {
      return binaryNumbers(value, fileVr, littleEndian).join('\\');
    }
    const decoded = characterSet.decode(value, dictionaryVrOfKey(tag) === 'PN');
    if (decoded.callsUnlisted) findings.unlistedSet();
    if (decoded.text.includes('\ufffd')) findings.unreadable();
    return decoded.text;
  }

  function texts(tag: string): readonly string[] | undefined {
    const value = valueBytes(tag);
    if (value === undefined) return undefined;
    const text = trimPadding(decode(tag, value));
    if (text === '') return undefined;
    if (!text.includes('\\')) return [text];
    const values = text.split('\\').map(trimPadding);
    return values.some((one) => one !== '') ? values : undefined;
  }

  function decimals(tag: string): readonly (number | undefined)[] | undefined {
    return texts(tag)?.map((text) => {
      const value = decimalString(text);
      if (value === undefined && text !== '') findings.notANumber(tag);
      if (value !== undefined && text.includes(',')) findings.decimalComma(tag);
      return value;
    });
  }

  function integer(tag: string): number | undefined {
    const first = texts(tag)?.[0];
    if (first === undefined || first === '') return undefined;
    const value = integerString(first);
    if (value === undefined) findings.notAnInteger(tag);
    return value;
  }

  return {
    has: (tag) => (dataSet.find(tag)?.length ?? 0) > 0,
    texts,
    text: (tag) => {
      const values = texts(tag);
      return values?.length === 1 ? values[0] : values?.join('\\');
    },
    decimals,
    decimal: (tag) => decimals(tag)?.[0],
    integer,
    unsignedShort: (tag) => whole(tag, 2, 0, (at) => view.getUint16(at, littleEndian)),
    signedShort: (tag) => whole(tag, 2, -0x8000, (at) => view.getInt16(at, littleEndian)),
    shorts: (tag) => {
      const place = dataSet.find(tag);
      const value = valueBytes(tag);
      if (place === undefined || value === undefined || value.length < 2) return undefined;
      return Array.from({ length: value.length >> 1 }, (_, index) =>
        view.getUint16(place.offset + index * 2, littleEndian),
      );
    },
    unsignedLong: (tag) => whole(tag, 4, 0, (at) => view.getUint32(at, littleEndian)),
    float: (tag) => binary(tag, 4, (at) => view.getFloat32(at, littleEndian)),
    double: (tag) => binary(tag, 8, (at) => view.getFloat64(at, littleEndian)),
    items: (tag) =>
      dataSet.items(tag)?.map((item) => attributesOf(item, { characterSet, findings, chosen })),
    findings: findings.list,
  };
}

/** Strings are padded with spaces, UIDs with NUL (PS3.5 6.2); some writers mix the two. */
function trimPadding(text: string): string {
  let start = 0;
  let end = text.length;
  while (start < end && isPadding(text.charCodeAt(start))) start++;
  while (end > start && isPadding(text.charCodeAt(end - 1))) end--;
  return start === 0 && end === text.length ? text : text.slice(start, end);
}

function isPadding(code: number): boolean {
  return code === 0x20 || code === 0;
}
