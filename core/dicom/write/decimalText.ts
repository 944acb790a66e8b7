/**
 * A number as a Decimal String: at most 16 characters (PS3.5 table 6.2-1, DS), with as many digits as fit.
 * Throws for a number that is not finite: the standard has no text for it.
 */
export function decimalText(value: number): string {
  if (!Number.isFinite(value)) throw new RangeError(`invalid decimal string: ${value}`);
  const plain = String(value);
  if (plain.length <= 16) return plain;
  for (let digits = 16; digits > 0; digits -= 1) {
    // Number() takes the trailing zeros away that toPrecision leaves.
    const text = String(Number(value.toPrecision(digits)));
    if (text.length <= 16) return text;
  }
  throw new RangeError(`invalid decimal string: ${value}`);
}

/** A whole number as an Integer String: −2³¹ … 2³¹ − 1 (PS3.5 table 6.2-1, IS). Throws for anything else. */
export function integerText(value: number): string {
  if (!Number.isInteger(value) || value < -(2 ** 31) || value > 2 ** 31 - 1)
    throw new RangeError(`invalid integer string: ${value}`);
  return String(value);
}
