import type { CtImage } from '../dicom/index.js';
import { alongNormal } from '../geometry/index.js';
import type { Finding } from '../result.js';
import { groupKey, sameGridKind } from './grouping.js';
import { readSpacing } from './spacing.js';
import type { LeftOut, Stack, StackSlice } from './stack.js';
import { tiltDegrees } from './tilt.js';

/** A CT slice and the file that holds it. */
export interface IndexedImage {
  readonly fileId: number;
  readonly file: string;
  readonly image: CtImage;
}

/** Positions closer than this are one place, mm. */
const SAME_PLACE_MM = 1e-3;

/**
 * Sorts slices into stacks. Order and spacing come from positions along the normal (PS3.3 C.7.6.2.1.1), never
 * from instance numbers, slice locations or thickness. A slice that stands where another of its stack stands
 * already is left out, with the reason.
 */
export function buildStacks(files: readonly IndexedImage[]): {
  stacks: readonly Stack[];
  leftOut: readonly LeftOut[];
} {
  const leftOut: LeftOut[] = [];
  const groups = new Map<string, IndexedImage[][]>();
  for (const file of withoutCopies(files, leftOut)) {
    const key = groupKey(file.image);
    const kinds = groups.get(key) ?? [];
    const kind = kinds.find(([first]) => first && sameGridKind(first.image, file.image));
    if (kind) kind.push(file);
    else kinds.push([file]);
    groups.set(key, kinds);
  }
  const bare = [...groups.values()]
    .flat()
    .map((members) => orderSlices(members, leftOut))
    .sort(inSeriesOrder);
  return { stacks: nameStacks(bare), leftOut };
}

type Slices = Stack['slices'];

/** The same SOP instance a second time (AWKWARD row 15): the first in the order of the files stays. */
function withoutCopies(files: readonly IndexedImage[], leftOut: LeftOut[]): IndexedImage[] {
  const seen = new Map<string, string>();
  return files.filter(({ file, image }) => {
    const instance = `${image.sopInstanceUid} ${image.frame ?? 0}`;
    const first = seen.get(instance);
    if (first === undefined) {
      seen.set(instance, file);
      return true;
    }
    leftOut.push({ file, code: 'duplicate', text: `The same image as ${first}: left out.` });
    return false;
  });
}

function orderSlices(members: readonly IndexedImage[], leftOut: LeftOut[]): Slices {
  const [first, ...rest] = members;
  if (first === undefined) throw new RangeError('no members in a group');
  const { grid } = first.image;
  const place = (member: IndexedImage): StackSlice => ({
    ...member,
    alongMm: alongNormal(grid, member.image.grid.positionMm),
  });
  const ordered = [first, ...rest]
    .map(place)
    .sort((a, b) => a.alongMm - b.alongMm || (a.file < b.file ? -1 : 1));
  const slices: StackSlice[] = [];
  for (const slice of ordered) {
    const before = slices[slices.length - 1];
    if (before !== undefined && slice.alongMm - before.alongMm < SAME_PLACE_MM) {
      leftOut.push({
        file: slice.file,
        code: 'same-position',
        text: `A second image at the place of ${before.file} in its series: left out.`,
      });
    } else {
      slices.push(slice);
    }
  }
  return slices as unknown as Slices;
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
    compare(a.alongMm, b.alongMm) ||
    compare(groupKey(x), groupKey(y))
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
