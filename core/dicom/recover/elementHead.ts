import { dictionaryVr, isKnownVr, isShortVr } from './vr.js';

export const UNDEFINED_LENGTH = 0xffffffff;

/** Head of a data element: where its value begins and how long it says to be. */
export interface ElementHead {
  readonly tag: number;
  /** As the file states it; the dictionary's, or UN, where the file states none or nonsense. */
  readonly vr: string;
  readonly at: number;
  readonly valueAt: number;
  readonly length: number;
  /** The file's VR made no sense and the dictionary, or the next element, told what it must be. */
  readonly guessed: boolean;
}

/** How a data set is laid out. */
export interface Layout {
  readonly explicitVr: boolean;
  readonly littleEndian: boolean;
}

/** Reads the head at an offset; undefined when the bytes end in it or its length can't be told. */
export function readHead(view: DataView, at: number, layout: Layout): ElementHead | undefined {
  if (at + 8 > view.byteLength) return undefined;
  const tag = readTag(view, at, layout);
  const isDelimiter = tag >>> 16 === 0xfffe;
  if (!layout.explicitVr || isDelimiter) {
    const vr = isDelimiter ? '' : (dictionaryVr(tag) ?? 'UN');
    const length = view.getUint32(at + 4, layout.littleEndian);
    return { tag, vr, at, valueAt: at + 8, length, guessed: false };
  }
  const vr = vrLetters(view, at);
  if (isShortVr(vr)) {
    const length = view.getUint16(at + 6, layout.littleEndian);
    return { tag, vr, at, valueAt: at + 8, length, guessed: false };
  }
  // A VR that is not known yet but looks like one has the long form (PS3.5 6.2).
  if (isKnownVr(vr) || /^[A-Z]{2}$/.test(vr)) {
    if (at + 12 > view.byteLength) return undefined;
    const length = view.getUint32(at + 8, layout.littleEndian);
    return { tag, vr, at, valueAt: at + 12, length, guessed: false };
  }
  return guessHead(view, at, tag, layout);
}

/** VR letters that are none: of the three possible forms the one after which an element follows. */
function guessHead(
  view: DataView,
  at: number,
  tag: number,
  layout: Layout,
): ElementHead | undefined {
  const forms = [
    { valueAt: at + 8, length: view.getUint16(at + 6, layout.littleEndian) },
    ...(at + 12 <= view.byteLength
      ? [{ valueAt: at + 12, length: view.getUint32(at + 8, layout.littleEndian) }]
      : []),
    { valueAt: at + 8, length: view.getUint32(at + 4, layout.littleEndian) },
  ];
  const form = forms.find(({ valueAt, length }) => {
    const next = valueAt + length;
    if (next === view.byteLength) return true;
    if (next + 8 > view.byteLength) return false;
    const following = readTag(view, next, layout);
    if (following >>> 16 === 0xfffe) return true;
    // Writers that know no VR repeat the same nonsense.
    const letters = vrLetters(view, next);
    return following > tag && (isKnownVr(letters) || letters === vrLetters(view, at));
  });
  if (form === undefined) return undefined;
  return { tag, vr: dictionaryVr(tag) ?? 'UN', at, ...form, guessed: true };
}

/** The two letters where an explicit VR stands. */
export function vrLetters(view: DataView, at: number): string {
  return String.fromCharCode(view.getUint8(at + 4), view.getUint8(at + 5));
}

export function readTag(view: DataView, at: number, { littleEndian }: Layout): number {
  return view.getUint16(at, littleEndian) * 0x10000 + view.getUint16(at + 2, littleEndian);
}

/** Tag 0x00280010 as 'x00280010'. */
export function tagKey(tag: number): string {
  return `x${tag.toString(16).padStart(8, '0')}`;
}

/** True for the odd groups that belong to makers (PS3.5 7.8). */
export function isPrivate(tag: number): boolean {
  return ((tag >>> 16) & 1) === 1;
}
