import { EDGE_DEFINITIONS } from './edgeLineRows.js';
import { PROFILE_DEFINITIONS } from './profileRows.js';
import { type Digits, printedDigits } from './quantityDefinition.js';
import { REGION_DIGITS } from './regionQuantities.js';
import { KERNEL_DEFINITIONS, STENT_DEFINITIONS } from './stentQuantities.js';

const DIGITS_OF: ReadonlyMap<string, Digits> = new Map([
  ...REGION_DIGITS,
  ...[EDGE_DEFINITIONS, PROFILE_DEFINITIONS, STENT_DEFINITIONS, KERNEL_DEFINITIONS].flatMap(
    (definitions): readonly (readonly [string, Digits])[] =>
      definitions.map(({ quantity, digits }) => [quantity, digits]),
  ),
]);

/** A number as the tables print the quantity of this name; a CNR and the share of a band with one digit. */
export function printedAs(quantity: string, value: number): string {
  return printedDigits(value, DIGITS_OF.get(quantity) ?? 'ratio');
}
