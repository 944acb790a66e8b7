import type { Evidence } from '../note/index.js';

/** What both stacks state of one thing, word for word. */
export function compareTexts(
  check: string,
  a: string | undefined,
  b: string | undefined,
): Evidence {
  if (a === undefined || b === undefined) {
    return {
      check,
      state: 'unknown',
      text: `${check}: ${a ?? 'not stated'} and ${b ?? 'not stated'}`,
    };
  }
  return a === b
    ? { check, state: 'agrees', text: `same ${check}: ${a}` }
    : { check, state: 'differs', text: `another ${check}: ${a} and ${b}` };
}

/** What both stacks state of one quantity. @param tolerance in the unit; two values no further apart are the same */
export function compareNumbers(
  check: string,
  a: number | undefined,
  b: number | undefined,
  tolerance: number,
  unit: string,
): Evidence {
  if (a === undefined || b === undefined) {
    return { check, state: 'unknown', text: `${check}: ${say(a, unit)} and ${say(b, unit)}` };
  }
  return Math.abs(a - b) <= tolerance
    ? { check, state: 'agrees', text: `same ${check}: ${say(a, unit)}` }
    : { check, state: 'differs', text: `another ${check}: ${say(a, unit)} and ${say(b, unit)}` };
}

/** A number with at most three digits after the point and its unit. */
export function say(value: number | undefined, unit: string): string {
  return value === undefined ? 'not stated' : `${Number(value.toFixed(3))} ${unit}`;
}
