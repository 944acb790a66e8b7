import type { Stack } from './stack.js';

/** True for a stack whose files have no pixel spacing: it can be looked at, and nothing else. Slices of one stack are alike in it. */
export function isUnscaled({ slices }: Pick<Stack, 'slices'>): boolean {
  return slices[0].image.grid.unscaled === true;
}
