import { decimalText } from '../../dicom/write/index.js';

/** A number as a Decimal String, and in full where 16 characters are too few. */
export interface DecimalValue {
  /** Numeric Value (0040,A30A). */
  readonly text: string;
  /** Floating Point Value (0040,A161): only where the text is not the number itself. */
  readonly exact?: number;
}

/** Longest Decimal String, characters (PS3.5 table 6.2-1). */
const LONGEST = 16;

/**
 * A number with as many digits as a Decimal String holds. `print` is how the measurement table prints it: where
 * rounding would cross the border at which the print changes, the last digit goes to the side that prints the same, so
 * that reading the text and printing it again gives the same digits.
 */
export function decimalValue(value: number, print: (value: number) => string): DecimalValue {
  const rounded = decimalText(value);
  const wanted = print(value);
  const text =
    [rounded, ...neighbours(value)].find((one) => print(Number(one)) === wanted) ?? rounded;
  return Number(text) === value ? { text } : { text, exact: value };
}

/** The texts next below and next above a number in size, with as many decimals as there is room for. */
function neighbours(value: number): readonly string[] {
  const size = Math.abs(value);
  const sign = value < 0 ? '-' : '';
  const decimals = LONGEST - sign.length - Math.trunc(size).toFixed(0).length - 1;
  if (decimals < 1) return [];
  const near = Number(size.toFixed(decimals));
  const step = 10 ** -decimals;
  return [near - step, near + step].map((one) => `${sign}${Math.abs(one).toFixed(decimals)}`);
}
