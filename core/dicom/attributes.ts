import { decodeText } from './characterSet.js';
import type { DataSet } from './dataSet.js';
import { decimalString, integerString } from './numberStrings.js';

/** Typed look into a data set's top level. An empty attribute is an absent one (AWKWARD row 50: never 0). */
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
}

/** @param dataSet as {@link parseDataSet} gives it */
export function attributesOf({ parsed, bytes }: DataSet): Attributes {
  const characterSet = rawText('x00080005')?.split('\\')[0] ?? '';

  function valueBytes(tag: string): Uint8Array | undefined {
    const element = parsed.elements[tag];
    if (element === undefined || element.length === 0 || element.length === 0xffffffff) return;
    return bytes.subarray(element.dataOffset, element.dataOffset + element.length);
  }

  function rawText(tag: string): string | undefined {
    const value = valueBytes(tag);
    return value === undefined ? undefined : decodeText(value, '');
  }

  function texts(tag: string): readonly string[] | undefined {
    const value = valueBytes(tag);
    if (value === undefined) return undefined;
    const whole = decodeText(value, characterSet);
    const values = whole.split('\\').map(trimPadding);
    return values.some((one) => one !== '') ? values : undefined;
  }

  const decimals = (tag: string) => texts(tag)?.map(decimalString);

  return {
    has: (tag) => (parsed.elements[tag]?.length ?? 0) > 0,
    texts,
    text: (tag) => texts(tag)?.join('\\'),
    decimals,
    decimal: (tag) => decimals(tag)?.[0],
    integer: (tag) => {
      const first = texts(tag)?.[0];
      return first === undefined ? undefined : integerString(first);
    },
    unsignedShort: (tag) => ((valueBytes(tag)?.length ?? 0) >= 2 ? parsed.uint16(tag) : undefined),
    signedShort: (tag) => ((valueBytes(tag)?.length ?? 0) >= 2 ? parsed.int16(tag) : undefined),
    float: (tag) => ((valueBytes(tag)?.length ?? 0) >= 4 ? parsed.float(tag) : undefined),
  };
}

/** Strings are padded with spaces, UIDs with NUL (PS3.5 6.2); some writers mix the two. */
function trimPadding(text: string): string {
  return text.replace(/^[ \0]+|[ \0]+$/g, '');
}
