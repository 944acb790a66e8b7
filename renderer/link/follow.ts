import type { Link } from '../../core/note/index.js';
import type { Stack } from '../../core/stack/index.js';
import { nearestSlice, positionIn } from './slicePosition.js';

/**
 * Where the other plate goes when one plate goes to `alongMm`: the same place in patient space, or, when
 * positions can't be compared, the slice of the same number. Beyond the other stack's last slice the
 * position goes on at its spacing, so that the plate says that there is no slice and comes back in step.
 * Undefined when no place of the other stack belongs to it.
 */
export function followPosition(
  link: Link,
  from: Stack,
  alongMm: number,
  to: Stack,
): number | undefined {
  if (link === 'position') return positionIn(from, alongMm, to);
  const index = nearestSlice(from.slices, alongMm);
  const slice = to.slices[index];
  if (slice !== undefined) return slice.alongMm;
  const last = to.slices[to.slices.length - 1] ?? to.slices[0];
  const beyond = index - (to.slices.length - 1);
  return last.alongMm + beyond * (to.sliceSpacingMm ?? 1);
}
