import { type Encoding, type WriteElement, writeDataSet } from '../../core/dicom/write/index.js';

/** Explicit VR little endian, as most of the corpus is written. */
export const EXPLICIT: Encoding = { explicitVr: true, littleEndian: true };
export const IMPLICIT: Encoding = { explicitVr: false, littleEndian: true };
export const BIG_ENDIAN: Encoding = { explicitVr: true, littleEndian: false };

export const SYNTAX = {
  implicit: '1.2.840.10008.1.2',
  explicit: '1.2.840.10008.1.2.1',
  deflated: '1.2.840.10008.1.2.1.99',
  bigEndian: '1.2.840.10008.1.2.2',
} as const;

/** FFFE,E000 with a length of 4 bytes behind it, little endian. */
export const ITEM = [0xfe, 0xff, 0x00, 0xe0] as const;
export const ITEM_END = [0xfe, 0xff, 0x0d, 0xe0, 0, 0, 0, 0] as const;
export const SEQUENCE_END = [0xfe, 0xff, 0xdd, 0xe0, 0, 0, 0, 0] as const;
export const OPEN = 0xffffffff;

export function concat(...parts: readonly (Uint8Array | readonly number[])[]): Uint8Array {
  const whole = new Uint8Array(parts.reduce((sum, part) => sum + part.length, 0));
  let at = 0;
  for (const part of parts) {
    whole.set(part, at);
    at += part.length;
  }
  return whole;
}

/** Each character as one byte: ISO 8859-1. */
export function latin1(text: string): Uint8Array {
  return Uint8Array.from(text, (character) => character.charCodeAt(0));
}

/** '1b 24 42' as bytes. */
export function hex(text: string): Uint8Array {
  return Uint8Array.from(text.trim().split(/\s+/), (byte) => Number.parseInt(byte, 16));
}

export function u32(value: number): Uint8Array {
  return Uint8Array.of(value, value >>> 8, value >>> 16, value >>> 24);
}

export function tagBytes(tag: number): Uint8Array {
  return Uint8Array.of(tag >>> 16, tag >>> 24, tag, tag >>> 8);
}

/** Length 2 bytes behind the VR, 4 bytes behind the VR and two spare ones, or 4 bytes without a VR. */
export type HeadForm = 'short' | 'long' | 'implicit';

/** An element in little endian with any letters and any length, right or wrong. */
export function rawElement(
  tag: number,
  vr: string,
  form: HeadForm,
  value: Uint8Array | readonly number[],
  length = value.length,
): Uint8Array {
  if (form === 'implicit') return concat(tagBytes(tag), u32(length), value);
  const spare = form === 'long' ? [0, 0] : [];
  const size = form === 'long' ? u32(length) : u32(length).subarray(0, 2);
  return concat(tagBytes(tag), latin1(vr), spare, size, value);
}

/** A preamble, 'DICM', meta information and whatever is to follow. */
export function rawFile(
  meta: Uint8Array,
  dataSet: Uint8Array,
  preamble: Uint8Array = new Uint8Array(128),
): Uint8Array {
  return concat(preamble, latin1('DICM'), meta, dataSet);
}

/** Group 0002 of a CT image; without a transfer syntax when that is undefined. */
export function metaElements(transferSyntaxUid: string | undefined): readonly WriteElement[] {
  return [
    { tag: 0x00020001, vr: 'OB', value: Uint8Array.of(0, 1) },
    { tag: 0x00020002, vr: 'UI', value: '1.2.840.10008.5.1.4.1.1.2' },
    { tag: 0x00020003, vr: 'UI', value: '2.25.77001.2.1.1' },
    ...(transferSyntaxUid === undefined
      ? []
      : [{ tag: 0x00020010, vr: 'UI', value: transferSyntaxUid } as const]),
    { tag: 0x00020012, vr: 'UI', value: '2.25.77001.99' },
  ];
}

/** Meta information with its group length, right unless another is given. */
export function metaBytes(
  transferSyntaxUid: string | undefined,
  { encoding = EXPLICIT, groupLength }: { encoding?: Encoding; groupLength?: number } = {},
): Uint8Array {
  const group = writeDataSet(metaElements(transferSyntaxUid), encoding);
  const length = { tag: 0x00020000, vr: 'UL', value: groupLength ?? group.length } as const;
  return concat(writeDataSet([length], encoding), group);
}

/** Where an element's head begins in a file in explicit VR little endian. Throws when it is not there. */
export function placeOf(file: Uint8Array, tag: number, vr: string): number {
  const wanted = concat(tagBytes(tag), latin1(vr));
  for (let at = 0; at + 6 <= file.length; at++) {
    if (wanted.every((byte, index) => file[at + index] === byte)) return at;
  }
  throw new RangeError(`no such element: ${tag.toString(16)}`);
}

/** Bytes put in before an element of a file in explicit VR little endian. */
export function insertBefore(
  file: Uint8Array,
  tag: number,
  vr: string,
  bytes: Uint8Array,
): Uint8Array {
  const at = placeOf(file, tag, vr);
  return concat(file.subarray(0, at), bytes, file.subarray(at));
}

/** An element in the short form taken away, and other bytes in its place. */
export function replaceShort(
  file: Uint8Array,
  tag: number,
  vr: string,
  bytes: Uint8Array,
): Uint8Array {
  const at = placeOf(file, tag, vr);
  const length = (file[at + 6] ?? 0) + (file[at + 7] ?? 0) * 256;
  return concat(file.subarray(0, at), bytes, file.subarray(at + 8 + length));
}
