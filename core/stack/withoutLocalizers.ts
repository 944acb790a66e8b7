import { dot, gridNormal } from '../geometry/index.js';
import type { IndexedImage } from './indexedImage.js';
import type { LeaveOut } from './leaveOut.js';

/** Cosine of the angle between normals up to which slices stand across others: 80°. */
const ACROSS = 0.17;

/** A series has at most so many localizers, and at least so many times as many slices. */
const MOST_LOCALIZERS = 3;
const SLICES_EACH = 3;

type Group = readonly IndexedImage[];

/**
 * Takes away a few slices that stand across all others of their series: localizers, whatever their Image Type says
 * (AWKWARD row 82).
 */
export function withoutLocalizers(groups: readonly Group[], leaveOut: LeaveOut): readonly Group[] {
  const largest = new Map<string, Group>();
  for (const group of groups) {
    const series = seriesOf(group);
    if (group.length > (largest.get(series)?.length ?? 0)) largest.set(series, group);
  }
  return groups.filter((group) => {
    const main = largest.get(seriesOf(group));
    if (main === undefined || !isLocalizer(group, main)) return true;
    for (const { file } of group) {
      leaveOut.add(file, {
        code: 'localizer',
        text: 'It stands across the other slices of its series: a localizer, not a slice.',
      });
    }
    return false;
  });
}

function isLocalizer(group: Group, main: Group): boolean {
  const [a] = group;
  const [b] = main;
  if (a === undefined || b === undefined || group.length > MOST_LOCALIZERS) return false;
  if (main.length < SLICES_EACH * group.length || main.length <= MOST_LOCALIZERS) return false;
  return Math.abs(dot(gridNormal(a.image.grid), gridNormal(b.image.grid))) < ACROSS;
}

function seriesOf([first]: Group): string {
  const image = first?.image;
  return JSON.stringify([image?.identity.patientId, image?.acquisition.seriesInstanceUid]);
}
