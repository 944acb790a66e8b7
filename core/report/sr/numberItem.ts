import type { WriteElement } from '../../dicom/write/index.js';
import { type Code, codeSequence, dcm } from './code.js';
import { type ContentItem, contentItem, type Relationship } from './contentItem.js';
import { type DecimalValue, decimalValue } from './decimalValue.js';

/** Why a number has no value: CID 42, Numeric Value Qualifier. */
export const NO_VALUE_CODES = {
  divideByZero: dcm('114003', 'Divide by zero'),
  failure: dcm('114006', 'Measurement failure'),
  notAttempted: dcm('114007', 'Measurement not attempted'),
} as const;

export interface NumberParts {
  readonly relationship: Relationship;
  readonly name: Code;
  readonly unit: Code;
  readonly value: number | null;
  /** How the value is printed everywhere; what is written prints the same. */
  readonly print: (value: number) => string;
  /** Why there is no value; used only then. */
  readonly missing: Code;
  readonly children?: readonly ContentItem[];
}

/** A NUM. One without a value has an empty Measured Value Sequence and the reason as a qualifier (PS3.3 table C.18.1-1). */
export function numberItem({
  relationship,
  name,
  unit,
  value,
  print,
  missing,
  children = [],
}: NumberParts): ContentItem {
  const measured: readonly WriteElement[] =
    value === null
      ? [{ tag: 0x0040a300, vr: 'SQ', items: [] }, codeSequence(0x0040a301, missing)]
      : [{ tag: 0x0040a300, vr: 'SQ', items: [measuredValue(decimalValue(value, print), unit)] }];
  return contentItem({ relationship, type: 'NUM', name }, measured, children);
}

function measuredValue({ text, exact }: DecimalValue, unit: Code): readonly WriteElement[] {
  return [
    codeSequence(0x004008ea, unit),
    ...(exact === undefined ? [] : [{ tag: 0x0040a161, vr: 'FD' as const, value: exact }]),
    { tag: 0x0040a30a, vr: 'DS', value: text },
  ];
}
