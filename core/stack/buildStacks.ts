import { alongNormal } from '../geometry/index.js';
import type { Finding } from '../result.js';
import { groupKey, sameGridKind } from './grouping.js';
import { folderOf, type IndexedImage } from './indexedImage.js';
import { createLeaveOut, type LeaveOut } from './leaveOut.js';
import { separateRepeats } from './separateRepeats.js';
import { readSpacing } from './spacing.js';
import type { LeftOut, Stack, StackSlice } from './stack.js';
import { tiltDegrees } from './tilt.js';
import { withoutCopies } from './withoutCopies.js';
import { withoutLocalizers } from './withoutLocalizers.js';
import { hasMadeUid, withUids } from './withUids.js';

/**
 * Sorts slices into stacks. Order and spacing come from positions along the normal (PS3.3 C.7.6.2.1.1), never
 * from instance numbers, slice locations or thickness. Slices that can't be told apart are not stacked at all.
 *
 * @param folderName name of the opened folder, for slices without UIDs
 */
export function buildStacks(
  files: readonly IndexedImage[],
  folderName = '',
): { stacks: readonly Stack[]; leftOut: readonly LeftOut[] } {
  const leaveOut = createLeaveOut();
  const named = files.map((file) => withUids(file, folderName));
  const groups = withoutLocalizers(groupSlices(withoutCopies(named, leaveOut)), leaveOut);
  const bare = groups
    .flatMap((members) => separateRepeats(members) ?? refuseRepeats(members, leaveOut))
    .map(orderSlices)
    .sort(inSeriesOrder);
  return { stacks: nameStacks(bare), leftOut: leaveOut.all() };
}

type Slices = Stack['slices'];

function groupSlices(files: readonly IndexedImage[]): readonly (readonly IndexedImage[])[] {
  const groups = new Map<string, IndexedImage[][]>();
  for (const file of files) {
    const key = groupKey(file.image) + (hasMadeUid(file) ? folderOf(file) : '');
    const kinds = groups.get(key) ?? [];
    const kind = kinds.find(([first]) => first && sameGridKind(first.image, file.image));
    if (kind) kind.push(file);
    else kinds.push([file]);
    groups.set(key, kinds);
  }
  return [...groups.values()].flat();
}

function refuseRepeats(members: readonly IndexedImage[], leaveOut: LeaveOut): readonly [] {
  for (const { file } of members) {
    leaveOut.add(file, {
      code: 'repeated-positions',
      text: `One of ${members.length} slices of its series of which several stand at one place, and nothing tells them apart: not stacked.`,
    });
  }
  return [];
}

function orderSlices(members: readonly IndexedImage[]): Slices {
  const [first, ...rest] = members;
  if (first === undefined) throw new RangeError('no members in a group');
  const place = ({ fileId, file, image }: IndexedImage): StackSlice => ({
    fileId,
    file,
    image,
    alongMm: alongNormal(first.image.grid, image.grid.positionMm),
  });
  const ordered = [first, ...rest].map(place).sort((a, b) => a.alongMm - b.alongMm);
  return ordered as unknown as Slices;
}

function inSeriesOrder([a]: Slices, [b]: Slices): number {
  const x = a.image;
  const y = b.image;
  return (
    compare(x.identity.patientId ?? '', y.identity.patientId ?? '') ||
    compare(x.identity.studyInstanceUid, y.identity.studyInstanceUid) ||
    compare(x.acquisition.seriesNumber ?? Infinity, y.acquisition.seriesNumber ?? Infinity) ||
    compare(x.acquisition.seriesInstanceUid, y.acquisition.seriesInstanceUid) ||
    compare(x.acquisition.phasePercent ?? -1, y.acquisition.phasePercent ?? -1) ||
    compare(x.acquisition.acquisitionNumber ?? -1, y.acquisition.acquisitionNumber ?? -1) ||
    compare(x.acquisition.triggerTimeMs ?? -1, y.acquisition.triggerTimeMs ?? -1) ||
    compare(x.acquisition.temporalPosition ?? -1, y.acquisition.temporalPosition ?? -1) ||
    compare(x.acquisition.acquisitionTime ?? '', y.acquisition.acquisitionTime ?? '') ||
    compare(a.alongMm, b.alongMm) ||
    compare(groupKey(x), groupKey(y)) ||
    compare(a.file, b.file)
  );
}

function compare<T extends string | number>(a: T, b: T): number {
  return a < b ? -1 : a > b ? 1 : 0;
}

function nameStacks(all: readonly Slices[]): Stack[] {
  const seriesOf = ([first]: Slices): string => first.image.acquisition.seriesInstanceUid;
  const count = new Map<string, number>();
  for (const slices of all) count.set(seriesOf(slices), (count.get(seriesOf(slices)) ?? 0) + 1);
  const given = new Map<string, number>();
  return all.map((slices) => {
    const series = seriesOf(slices);
    const ordinal = (given.get(series) ?? 0) + 1;
    given.set(series, ordinal);
    const parts = count.get(series) ?? 1;
    return makeStack(parts === 1 ? series : `${series}#${ordinal}`, slices, parts);
  });
}

function makeStack(key: string, slices: Slices, parts: number): Stack {
  const spacing = readSpacing(slices.map((slice) => slice.alongMm));
  const findings = [...sharedFindings(slices), ...spacing.findings];
  if (numbersRepeat(slices)) {
    findings.push({
      code: 'instance-numbers',
      text: 'Instance numbers repeat; the order is that of the positions.',
    });
  }
  const tilt = tiltDegrees(slices);
  if (tilt > 0) {
    findings.push({
      code: 'tilted',
      text: `The stack is sheared by ${tilt.toFixed(1)}°, measured from its positions.`,
    });
  }
  if (parts > 1) {
    findings.push({ code: 'split-series', text: `One of ${parts} stacks of its series.` });
  }
  return {
    key,
    slices,
    ...(spacing.sliceSpacingMm !== undefined && { sliceSpacingMm: spacing.sliceSpacingMm }),
    unit: slices[0].image.pixels.unit,
    findings,
  };
}

/** Frames of one file share its number, which says nothing. */
function numbersRepeat(slices: Slices): boolean {
  const numbers = slices.flatMap(({ image }) =>
    image.frame === undefined && image.instanceNumber !== undefined ? [image.instanceNumber] : [],
  );
  return new Set(numbers).size < numbers.length;
}

/** Findings of the slices, each once, with the number of slices where not all have it. */
function sharedFindings(slices: Slices): Finding[] {
  const found = new Map<string, { finding: Finding; slices: number }>();
  for (const { image } of slices) {
    for (const finding of image.findings) {
      const entry = found.get(finding.text) ?? { finding, slices: 0 };
      entry.slices++;
      found.set(finding.text, entry);
    }
  }
  return [...found.values()].map(({ finding, slices: n }) =>
    n === slices.length
      ? finding
      : { ...finding, text: `${finding.text} (${n} of ${slices.length} slices)` },
  );
}
