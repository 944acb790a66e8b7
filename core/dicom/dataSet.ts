import dicomParser, { type Element, type DataSet as ParsedDataSet } from 'dicom-parser';
import { type Result, refuse, success } from '../result.js';
import { inflateRaw } from './inflate.js';

/** A data set as parsed, with the bytes that its offsets point into (inflated ones for a deflated file). */
export interface DataSet {
  readonly parsed: ParsedDataSet;
  readonly bytes: Uint8Array;
}

/** Pixel Data (7FE0,0010) in the form that dicom-parser uses. */
export const PIXEL_DATA = 'x7fe00010';

/** True when the bytes begin like a DICOM file: 128 free bytes and 'DICM' (PS3.10 7.1). */
export function hasPreamble(bytes: Uint8Array): boolean {
  return bytes[128] === 0x44 && bytes[129] === 0x49 && bytes[130] === 0x43 && bytes[131] === 0x4d;
}

/**
 * Parses a file up to and including the head of its Pixel Data.
 *
 * @param bytes the file, or as much of its beginning as has been read
 * @returns refused with the tag and offset where the bytes stop making sense; for a part of a file that may
 *   only mean that more of it is needed
 */
export function parseDataSet(bytes: Uint8Array): Result<DataSet> {
  let inflated: Result<Uint8Array> | undefined;
  const inflater = (file: Uint8Array, position: number): Uint8Array => {
    inflated = inflateRaw(file.subarray(position));
    if (!inflated.ok) throw inflated.refusal.text;
    const whole = new Uint8Array(position + inflated.value.length);
    whole.set(file.subarray(0, position));
    whole.set(inflated.value, position);
    return whole;
  };
  try {
    const parsed = dicomParser.parseDicom(bytes, { untilTag: PIXEL_DATA, inflater } as object);
    const overrun = overrunningElement(parsed);
    if (overrun !== undefined) return refuseCut(overrun, parsed.byteArray.length);
    return success({ parsed, bytes: parsed.byteArray });
  } catch (thrown) {
    if (inflated !== undefined && !inflated.ok) return inflated;
    return refuseThrown(thrown, bytes.length);
  }
}

/** False when the bytes end between two elements before Pixel Data: the file may go on. */
export function reachesPixelData({ parsed }: DataSet): boolean {
  return parsed.elements[PIXEL_DATA] !== undefined;
}

/** The last element, when it says that it is longer than the bytes that are left. The parser lets that pass. */
function overrunningElement(parsed: ParsedDataSet): Element | undefined {
  for (const element of Object.values(parsed.elements)) {
    if (element.tag === PIXEL_DATA || element.parser !== undefined) continue;
    if (element.dataOffset + element.length > parsed.byteArray.length) return element;
  }
  return undefined;
}

function refuseCut(element: Element, size: number): Result<never> {
  const tag = tagInWords(element.tag);
  return refuse('cut-header', `The file ends at byte ${size}, inside ${tag}.`, {
    tag,
    offset: element.dataOffset,
  });
}

/** dicom-parser throws bare strings, and objects with the part that it has read. */
function refuseThrown(thrown: unknown, size: number): Result<never> {
  const partial = (thrown as { dataSet?: ParsedDataSet } | undefined)?.dataSet;
  const read = Object.values(partial?.elements ?? {});
  const last = read.reduce<Element | undefined>(
    (latest, element) =>
      latest === undefined || element.dataOffset > latest.dataOffset ? element : latest,
    undefined,
  );
  if (last !== undefined && last.dataOffset + last.length > size) return refuseCut(last, size);
  if (last === undefined) {
    return refuse('cut-header', `The file ends at byte ${size}, before its first data element.`, {
      offset: size,
    });
  }
  const offset = last.dataOffset + last.length;
  // The head of an element is at most 12 bytes: fewer are left, so the file ends in the next one.
  if (size - offset < 12) {
    return refuse(
      'cut-header',
      `The file ends at byte ${size}, right after ${tagInWords(last.tag)}.`,
      {
        tag: tagInWords(last.tag),
        offset,
      },
    );
  }
  return refuse(
    'unreadable-header',
    `The data set can't be read past byte ${offset}, after ${tagInWords(last.tag)}.`,
    { tag: tagInWords(last.tag), offset },
  );
}

/** 'x00280010' as (0028,0010). */
export function tagInWords(tag: string): string {
  return `(${tag.slice(1, 5)},${tag.slice(5, 9)})`;
}
