/** What stands where there is no value: an en dash. The reason goes beside it, as a flag. */
export const NO_VALUE = '–';

/** The minus sign, U+2212: as wide as the plus sign, and no spreadsheet takes it for the start of a formula. */
export const MINUS = '−';

/** Digits after the point for each kind of number, the same on screen and in every export for people. */
export const DIGITS = {
  /** Mean, SD, median, standard error and differences of HU. */
  hu: 1,
  /** One pixel's value: minimum, maximum, under the cursor. */
  pixelHu: 0,
  ratio: 1,
  areaMm2: 1,
  positionMm: 1,
  /** Spacing, thickness, offsets and shifts. */
  lengthMm: 2,
  /** Density of a fit, whose standard error is of several HU, and what is set against it. */
  fittedHu: 0,
  /** Line mass of a strut ring. */
  massHuMm: 0,
  angleDeg: 1,
  /** Artificial narrowing of a lumen. */
  narrowingPercent: 0,
} as const;

export type Quantity = keyof typeof DIGITS;

type Maybe = number | null | undefined;

/**
 * A number with fixed digits, a real minus sign and no negative zero; NO_VALUE for null, undefined and what is not
 * finite. Rounds the binary value as Number.prototype.toFixed does.
 */
export function formatFixed(value: Maybe, digits: number): string {
  if (value === null || value === undefined || !Number.isFinite(value)) return NO_VALUE;
  const text = Math.abs(value).toFixed(digits);
  return value < 0 && /[1-9]/.test(text) ? `${MINUS}${text}` : text;
}

/** A number with the digits of its kind. */
export function formatQuantity(value: Maybe, quantity: Quantity): string {
  return formatFixed(value, DIGITS[quantity]);
}

/** A difference: always with its sign, but for a difference that rounds to zero. */
export function formatSigned(value: Maybe, digits: number): string {
  const text = formatFixed(value, digits);
  if (text === NO_VALUE || text.startsWith(MINUS)) return text;
  return /[1-9]/.test(text) ? `+${text}` : text;
}

/** 'mean ± SD' in HU; NO_VALUE without a mean, the mean alone without an SD. */
export function formatMeanSd(meanHu: Maybe, sdHu: Maybe): string {
  const mean = formatQuantity(meanHu, 'hu');
  const sd = formatQuantity(sdHu, 'hu');
  if (mean === NO_VALUE || sd === NO_VALUE) return mean;
  return `${mean} ± ${sd}`;
}

/** A whole count; thousands apart by a thin space (U+2009), as in ISO 80000-1. */
export function formatCount(count: Maybe): string {
  const text = formatFixed(count, 0);
  return text.replace(/\B(?=(\d{3})+$)/g, '\u2009');
}
