import type { WriteElement } from './element.js';
import { encodingOf, TRANSFER_SYNTAX } from './encoding.js';
import { valueBytes } from './valueBytes.js';
import { writeDataSet } from './writeDataSet.js';

/** Identifies the program that wrote a file (PS3.7 D.3.3.2); a UUID of our own under 2.25 (PS3.5 B.2). */
export const IMPLEMENTATION_CLASS_UID = '2.25.253353100294035914006340049797369520748';
export const IMPLEMENTATION_VERSION_NAME = 'DIPTYCH_1';

export interface WriteFileOptions {
  /** Explicit VR little endian when left out. */
  readonly transferSyntaxUid?: string;
  /** Applied to the bytes of the data set: raw deflate (RFC 1951) for the deflated transfer syntax. */
  readonly deflate?: (dataSet: Uint8Array) => Uint8Array;
}

const META_ENCODING = { explicitVr: true, littleEndian: true };

/**
 * A DICOM file: preamble, File Meta Information, data set (PS3.10 section 7.1). SOP class and instance are taken
 * from (0008,0016) and (0008,0018). Elements of group 0002 in the list replace those that would be written.
 * Throws when the deflated transfer syntax comes without a way to deflate.
 */
export function writeFile(
  elements: readonly WriteElement[],
  { transferSyntaxUid = TRANSFER_SYNTAX.explicitLittle, deflate }: WriteFileOptions = {},
): Uint8Array {
  if (transferSyntaxUid === TRANSFER_SYNTAX.deflatedExplicitLittle && deflate === undefined)
    throw new RangeError(`no deflate given for transfer syntax: ${transferSyntaxUid}`);
  const meta = metaBytes(elements, transferSyntaxUid);
  const dataSet = writeDataSet(
    elements.filter(({ tag }) => !isMeta(tag)),
    encodingOf(transferSyntaxUid),
  );
  const body = deflate === undefined ? dataSet : deflate(dataSet);
  const file = new Uint8Array(132 + meta.length + body.length);
  file.set([0x44, 0x49, 0x43, 0x4d], 128);
  file.set(meta, 132);
  file.set(body, 132 + meta.length);
  return file;
}

function metaBytes(elements: readonly WriteElement[], transferSyntaxUid: string): Uint8Array {
  const own: readonly WriteElement[] = [
    { tag: 0x00020001, vr: 'OB', value: Uint8Array.of(0, 1) },
    { tag: 0x00020002, vr: 'UI', value: identifier(elements, 0x00080016) },
    { tag: 0x00020003, vr: 'UI', value: identifier(elements, 0x00080018) },
    { tag: 0x00020010, vr: 'UI', value: transferSyntaxUid },
    { tag: 0x00020012, vr: 'UI', value: IMPLEMENTATION_CLASS_UID },
    { tag: 0x00020013, vr: 'SH', value: IMPLEMENTATION_VERSION_NAME },
  ];
  const given = elements.filter(({ tag }) => isMeta(tag) && tag !== 0x00020000);
  const replaced = new Set(given.map(({ tag }) => tag));
  const group = writeDataSet(
    [...own.filter(({ tag }) => !replaced.has(tag)), ...given],
    META_ENCODING,
  );
  const length = writeDataSet([{ tag: 0x00020000, vr: 'UL', value: group.length }], META_ENCODING);
  const meta = new Uint8Array(length.length + group.length);
  meta.set(length);
  meta.set(group, length.length);
  return meta;
}

/** The bytes of a UI element of the data set; empty when there is none, as test files may want. */
function identifier(elements: readonly WriteElement[], tag: number): Uint8Array {
  const element = elements.find((one) => one.tag === tag);
  return element?.vr === 'UI' ? valueBytes(element, true) : new Uint8Array(0);
}

function isMeta(tag: number): boolean {
  return tag >>> 16 === 2;
}
