import { decodeText } from './characterSet.js';
import type { DataSet } from './dataSet.js';
import { decimalString, integerString } from './numberStrings.js';

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
  float(tag: string): number | undefined;
  double(tag: string): number | undefined;
}

/** @param inheritedCharacterSet of the data set around an item, which holds unless the item has its own */
export function attributesOf(dataSet: DataSet, inheritedCharacterSet = ''): Attributes {
  const { bytes, littleEndian } = dataSet;
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  const ownCharacterSet = valueBytes('x00080005');
  const characterSet =
    ownCharacterSet === undefined ? inheritedCharacterSet : decodeText(ownCharacterSet, '');

  function valueBytes(tag: string): Uint8Array | undefined {
    const place = dataSet.find(tag);
    if (place === undefined || place.length === 0 || place.length === 0xffffffff) return undefined;
    return bytes.subarray(place.offset, place.offset + place.length);
  }

  function binary<T>(tag: string, size: number, read: (at: number) => T): T | undefined {
    const place = dataSet.find(tag);
    if (place === undefined || place.length < size || place.length === 0xffffffff) return undefined;
    return place.offset + size <= bytes.length ? read(place.offset) : undefined;
  }

  function texts(tag: string): readonly string[] | undefined {
    const value = valueBytes(tag);
    if (value === undefined) return undefined;
    const whole = trimPadding(decodeText(value, characterSet));
    if (whole === '') return undefined;
    if (!whole.includes('\\')) return [whole];
    const values = whole.split('\\').map(trimPadding);
    return values.some((one) => one !== '') ? values : undefined;
  }

  const decimals = (tag: string) => texts(tag)?.map(decimalString);

  return {
    has: (tag) => (dataSet.find(tag)?.length ?? 0) > 0,
    texts,
    text: (tag) => {
      const values = texts(tag);
      return values?.length === 1 ? values[0] : values?.join('\\');
    },
    decimals,
    decimal: (tag) => decimals(tag)?.[0],
    integer: (tag) => {
      const first = texts(tag)?.[0];
      return first === undefined ? undefined : integerString(first);
    },
    unsignedShort: (tag) => binary(tag, 2, (at) => view.getUint16(at, littleEndian)),
    signedShort: (tag) => binary(tag, 2, (at) => view.getInt16(at, littleEndian)),
    float: (tag) => binary(tag, 4, (at) => view.getFloat32(at, littleEndian)),
    double: (tag) => binary(tag, 8, (at) => view.getFloat64(at, littleEndian)),
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
