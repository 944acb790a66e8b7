import { ctSlice } from '../ctSlice.js';
import { type HeadForm, insertBefore, placeOf, rawElement } from '../rawBytes.js';

/** A private element put in before the patient's name. */
export function withPrivate(
  vr: string,
  form: HeadForm,
  value: Uint8Array | readonly number[],
  length?: number,
): Uint8Array {
  return insertBefore(ctSlice(), 0x00100010, 'PN', rawElement(0x00091001, vr, form, value, length));
}

/** Where that element stands, as refusals say it. */
export const AT_PRIVATE = `(0009,1001) at byte ${placeOf(ctSlice(), 0x00100010, 'PN')} `;
