import { formatFixed, formatQuantity, type Quantity } from '../format/index.js';

/** One number of a row, with all that it needs to be read: digits for people, unit, formula. */
export interface QuantityValue {
  readonly quantity: string;
  readonly value: number | null;
  /** For people, with a real minus sign; an en dash for no value. */
  readonly printed: string;
  readonly unit: string;
  readonly formula: string;
}

/** How a quantity is printed: with the digits of its kind, or as a whole count. */
export type Digits = Quantity | 'count';

/** How one quantity is had from what was measured, printed and explained. */
export interface QuantityDefinition<Measured> {
  readonly quantity: string;
  readonly value: (of: Measured) => number | null;
  readonly digits: Digits;
  readonly unit: string;
  readonly formula: string;
  /** Left out of a table when there is none: not every version or kernel has it. */
  readonly optional?: true;
}

/** The quantities of a measurement in the order of their definitions. */
export function quantityValues<Measured>(
  definitions: readonly QuantityDefinition<Measured>[],
  of: Measured,
): readonly QuantityValue[] {
  return definitions.flatMap(({ quantity, value, digits, unit, formula, optional }) => {
    const number = value(of);
    if (optional && number === null) return [];
    return [{ quantity, value: number, printed: printedDigits(number, digits), unit, formula }];
  });
}

/** A number as it is printed everywhere; an en dash for none. */
export function printedDigits(value: number | null, digits: Digits): string {
  return digits === 'count' ? formatFixed(value, 0) : formatQuantity(value, digits);
}
