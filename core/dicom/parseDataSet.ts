import dicomParser, { type Element, type DataSet as ParsedDataSet } from 'dicom-parser';
import { type Result, refuse, success } from '../result.js';
import { type DataSet, tagInWords } from './dataSet.js';
import { inflateRaw } from './inflate.js';
import { isKnownVr } from './recover/vr.js';
import { isRegular } from './regularity.js';
import { TRANSFER_SYNTAX } from './uids.js';

const PIXEL_DATA = 'x7fe00010';
const UNDEFINED_LENGTH = 0xffffffff;

/**
 * Parses a file that follows the standard, up to the head of its Pixel Data.
 *
 * @param bytes the file, or as much of its beginning as has been read
 * @returns refused with the tag and offset where the bytes stop making sense; for a part of a file that may
 *   only mean that more of it is needed. Refused as `irregular` where the standard is broken in a way that the
 *   parser does not see.
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
    const syntax = syntaxOf(parsed);
    const explicitVr = syntax !== TRANSFER_SYNTAX.implicitLittleEndian;
    if (!isRegular(parsed, explicitVr) || (!explicitVr && looksExplicit(parsed))) {
      return refuse('irregular', 'The data set breaks the rules of the standard.');
    }
    return success(fromParsed(parsed, syntax));
  } catch (thrown) {
    if (inflated !== undefined && !inflated.ok) return inflated;
    return refuseThrown(thrown, bytes.length);
  }
}

function syntaxOf(parsed: ParsedDataSet): string | undefined {
  return parsed.string('x00020010')?.trim();
}

/** The first element behind the meta information has letters of a VR where an implicit one has its length. */
function looksExplicit({ elements, byteArray }: ParsedDataSet): boolean {
  for (const key in elements) {
    const element = elements[key];
    if (element === undefined || element.parser !== undefined) continue;
    const [a = 0, b = 0] = byteArray.subarray(element.dataOffset - 4, element.dataOffset - 2);
    return isKnownVr(String.fromCharCode(a, b));
  }
  return false;
}

function fromParsed(parsed: ParsedDataSet, transferSyntaxUid: string | undefined): DataSet {
  const pixelData = parsed.elements[PIXEL_DATA];
  return {
    bytes: parsed.byteArray,
    littleEndian: transferSyntaxUid !== TRANSFER_SYNTAX.explicitBigEndian,
    ...(transferSyntaxUid !== undefined && { transferSyntaxUid }),
    find: (tag) => {
      const element = parsed.elements[tag];
      return element && { offset: element.dataOffset, length: element.length };
    },
    items: (tag) =>
      parsed.elements[tag]?.items?.map((item) =>
        fromParsed(item.dataSet ?? emptyOf(parsed), transferSyntaxUid),
      ),
    ...(pixelData && {
      pixelData: {
        offset: pixelData.dataOffset,
        length: pixelData.length,
        inFragments: pixelData.length === UNDEFINED_LENGTH,
      },
    }),
    findings: [],
  };
}

function emptyOf(parsed: ParsedDataSet): ParsedDataSet {
  return { ...parsed, elements: {} };
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
  const tag = tagInWords(last.tag);
  // The head of an element is at most 12 bytes: fewer are left, so the file ends in the next one.
  if (size - offset < 12) {
    return refuse('cut-header', `The file ends at byte ${size}, right after ${tag}.`, {
      tag,
      offset,
    });
  }
  return refuse(
    'unreadable-header',
    `The data set can't be read past byte ${offset}, after ${tag}.`,
    { tag, offset },
  );
}
