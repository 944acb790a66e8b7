import type { CtImage } from '../dicom/index.js';
import { alongNormal, dot } from '../geometry/index.js';
import type { IndexedImage } from './indexedImage.js';

/** Positions closer than this are one place, mm. */
export const SAME_PLACE_MM = 1e-3;

/** What may tell sets of slices at the same places apart; undefined where a slice does not say. */
const DISCRIMINATORS: readonly ((image: CtImage) => string | number | undefined)[] = [
  ({ acquisition }) => acquisition.acquisitionUid,
  ({ acquisition }) => acquisition.triggerTimeMs,
  ({ acquisition }) => acquisition.temporalPosition,
  ({ acquisition: { acquisitionDate, acquisitionTime } }) =>
    acquisitionTime && `${acquisitionDate ?? ''} ${acquisitionTime}`,
  ({ imageType }) => (imageType.length > 0 ? imageType.join('\\') : undefined),
  ({ acquisition }) => acquisition.kvp,
  ({ acquisition }) => acquisition.thicknessMm,
  ({ grid }) => {
    const inPlane = [grid.rowDirection, grid.columnDirection].map((axis) =>
      Math.round(dot(grid.positionMm, axis) * 100),
    );
    return inPlane.join(' ');
  },
];

/**
 * Sets of slices without a repeated position. Slices that repeat positions are told apart by the first attribute
 * that splits them into as many sets as slices stand at one place, each set without a repeat.
 *
 * @returns undefined when nothing tells them apart (AWKWARD row 87)
 */
export function separateRepeats(
  members: readonly IndexedImage[],
): readonly (readonly IndexedImage[])[] | undefined {
  const most = mostAtOnePlace(members);
  if (most <= 1) return [members];
  for (const of of DISCRIMINATORS) {
    const sets = new Map<string | number, IndexedImage[]>();
    for (const member of members) {
      const value = of(member.image);
      if (value === undefined) break;
      const set = sets.get(value);
      if (set === undefined) sets.set(value, [member]);
      else set.push(member);
    }
    const all = [...sets.values()];
    const counted = all.reduce((sum, set) => sum + set.length, 0);
    const complete = counted === members.length && all.length === most;
    if (complete && all.every((set) => mostAtOnePlace(set) === 1)) return all;
  }
  return undefined;
}

function mostAtOnePlace(members: readonly IndexedImage[]): number {
  const [first] = members;
  if (first === undefined) return 0;
  const places = members
    .map(({ image }) => alongNormal(first.image.grid, image.grid.positionMm))
    .sort((a, b) => a - b);
  let most = 1;
  let run = 1;
  for (let i = 1; i < places.length; i++) {
    run = (places[i] ?? 0) - (places[i - 1] ?? 0) < SAME_PLACE_MM ? run + 1 : 1;
    most = Math.max(most, run);
  }
  return most;
}
