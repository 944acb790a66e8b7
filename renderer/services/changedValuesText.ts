import type { ChangedValue } from '../state/changes/remeasure.js';

/** What to tell the reader when saved values no longer hold; undefined when all hold. */
export function changedValuesText(changed: readonly ChangedValue[]): string | undefined {
  const [first, ...others] = changed;
  if (first === undefined) return undefined;
  const now = first.nowHu === null ? 'no value' : `${first.nowHu.toFixed(1)} HU`;
  const more =
    others.length === 0
      ? ''
      : `, and ${others.length} more ${others.length === 1 ? 'value has' : 'values have'} changed`;
  return `The images no longer give what the note had: ${first.label} on the ${first.kernel} kernel was ${first.beforeHu.toFixed(1)} HU and is ${now}${more}. The note now has the new values.`;
}
