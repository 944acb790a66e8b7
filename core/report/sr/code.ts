import type { SequenceElement, WriteElement } from '../../dicom/write/index.js';
import { srText } from './srText.js';

/** A coded entry (PS3.3 8.8): what is meant, by a published scheme or by our own. */
export interface Code {
  readonly value: string;
  readonly scheme: string;
  readonly meaning: string;
}

/** DICOM Controlled Terminology (PS3.16 annex D). */
export function dcm(value: string, meaning: string): Code {
  return { value, scheme: 'DCM', meaning };
}

/** SNOMED CT, the concepts that DICOM uses (PS3.16). */
export function sct(value: string, meaning: string): Code {
  return { value, scheme: 'SCT', meaning };
}

/** A unit of the Unified Code for Units of Measure. */
export function ucum(value: string, meaning: string): Code {
  return { value, scheme: 'UCUM', meaning };
}

/** Longest Code Value (SH) and Code Meaning (LO), characters (PS3.5 table 6.2-1). */
const LONGEST_VALUE = 16;
const LONGEST_MEANING = 64;

/** A sequence of one coded entry under a tag. Throws for a code that has no room: those are our own mistakes. */
export function codeSequence(tag: number, ...codes: readonly Code[]): SequenceElement {
  return { tag, vr: 'SQ', items: codes.map(codeItem) };
}

function codeItem({ value, scheme, meaning }: Code): readonly WriteElement[] {
  if (value.length > LONGEST_VALUE || meaning.length > LONGEST_MEANING) {
    throw new RangeError(`code too long: ${value}, ${meaning}`);
  }
  return [
    { tag: 0x00080100, vr: 'SH', value: srText(value) },
    { tag: 0x00080102, vr: 'SH', value: srText(scheme) },
    { tag: 0x00080104, vr: 'LO', value: srText(meaning) },
  ];
}
