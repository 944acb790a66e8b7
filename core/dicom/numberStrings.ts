/**
 * One value of a Decimal String (PS3.5 6.2, DS). A lone decimal comma is read as a point, since writers of
 * some locales produce it; text, NaN and infinities are no value.
 */
export function decimalString(text: string): number | undefined {
  let trimmed = text.trim();
  if (/^[^.,]*,[^.,]*$/.test(trimmed)) trimmed = trimmed.replace(',', '.');
  if (!/^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/.test(trimmed)) return undefined;
  const value = Number(trimmed);
  return Number.isFinite(value) ? value : undefined;
}

/** One value of an Integer String (PS3.5 6.2, IS). '1.0' is 1; '4.1' is no integer and so no value. */
export function integerString(text: string): number | undefined {
  const value = decimalString(text);
  return value !== undefined && Number.isInteger(value) ? value : undefined;
}
