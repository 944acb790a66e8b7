import { groupKey } from './grouping.js';
import type { IndexedImage } from './indexedImage.js';
import type { LeaveOut } from './leaveOut.js';

/**
 * Slices that share one SOP Instance UID. Copies of one image: the first in the order of the files stays (AWKWARD
 * row 15). Images that differ: none stays, for nobody can say which of them the UID means (row 16).
 */
export function withoutCopies(
  files: readonly IndexedImage[],
  leaveOut: LeaveOut,
): readonly IndexedImage[] {
  return [...byInstance(files).values()].flatMap((group) => {
    const [first, ...others] = group;
    if (first === undefined || others.length === 0) return group;
    if (others.every((other) => isCopy(first, other))) {
      for (const { file } of others) {
        leaveOut.add(file, {
          code: 'duplicate',
          text: `The same image as ${first.file}: left out.`,
        });
      }
      return [first];
    }
    for (const { file } of group) {
      const another = group.find((other) => other.file !== file)?.file ?? first.file;
      leaveOut.add(file, {
        code: 'same-uid-other-pixels',
        text: `Another image than ${another}, under the same SOP Instance UID: both are left out. Keep the right one in the folder.`,
      });
    }
    return [];
  });
}

/** Slices by SOP Instance UID and frame, in the order in which they first come. */
export function byInstance(
  files: readonly IndexedImage[],
): ReadonlyMap<string, readonly IndexedImage[]> {
  const groups = new Map<string, IndexedImage[]>();
  for (const file of files) {
    const { sopInstanceUid, frame } = file.image;
    const instance = `${sopInstanceUid} ${frame ?? ''}`;
    const group = groups.get(instance);
    if (group === undefined) groups.set(instance, [file]);
    else group.push(file);
  }
  return groups;
}

/** Pixels that were not compared count as others. */
function isCopy(a: IndexedImage, b: IndexedImage): boolean {
  const header = ({ image }: IndexedImage) =>
    JSON.stringify([groupKey(image), image.grid, image.pixels.rescale, image.pixels.padding]);
  return a.pixelDigest !== undefined && a.pixelDigest === b.pixelDigest && header(a) === header(b);
}
