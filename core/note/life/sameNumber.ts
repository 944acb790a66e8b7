/**
 * Whether two numbers are the same but for rounding, relative to the larger of them and to 1 at least. A number and none
 * are never the same.
 */
export function isSameNumber(before: number | null, now: number | null, rounding: number): boolean {
  if (before === null || now === null) return before === now;
  const size = Math.max(Math.abs(before), Math.abs(now), 1);
  return Math.abs(before - now) <= rounding * size;
}
