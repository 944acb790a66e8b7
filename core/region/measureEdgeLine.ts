import { alongNormal, distance, type Vec3 } from '../geometry/index.js';
import { blurOfRise, edgeOfLine, type LineEdge } from '../quality/index.js';
import type { Result } from '../result.js';
import { isUnscaled, type Stack, type StackSlice } from '../stack/index.js';
import { type BandLine, checkLineParallel, edgeSamples } from './edgeSamples.js';
import { type FoundSlice, findSliceAt } from './findSlice.js';
import { FLAGS } from './flags.js';
import type { StoredOf } from './measureRegion.js';
import type { Flag } from './value.js';

/** What an edge line measures on one stack. A value that can't be had is null, and a flag says why. */
export interface EdgeValue {
  /** 10–90 % distance of the edge, at right angles to it, with its standard error. */
  readonly riseMm: number | null;
  readonly riseErrorMm: number | null;
  /** The same read off the profile itself; null where noise hides it. */
  readonly crossingsMm: number | null;
  /** Full width at half maximum of the Gaussian blur with that rise, and its standard error. */
  readonly blurFwhmMm: number | null;
  readonly blurErrorMm: number | null;
  /** Levels before and behind the edge, from the line's start on. */
  readonly fromHu: number | null;
  readonly toHu: number | null;
  /** Where the line crosses the edge, from its start. */
  readonly atMm: number | null;
  /** Pixels in the band. */
  readonly n: number;
  /** Index from 0 into the stack's ordered slices; null where the line lies on none of them. */
  readonly sliceIndex: number | null;
  /** From the line's plane to the slice, along the normal, signed, mm. */
  readonly sliceOffsetMm: number | null;
  readonly sopInstanceUid: string | null;
  /** Frame of a multi-frame image, from 1; null for an image of its own. */
  readonly frameNumber: number | null;
  readonly flags: readonly Flag[];
}

/** A shape that moves the crossings by more than this part of the rise, and by more than noise does, is told. */
const OTHER_SHAPE = 0.15;

/** The slice of a stack that a line is measured on: the rule is that of regions. */
export function findLineSlice(line: BandLine, stack: Stack): Result<FoundSlice> {
  const { grid } = stack.slices[0].image;
  const parallel = checkLineParallel(line, grid);
  if (!parallel.ok) return parallel;
  return findSliceAt(alongNormal(grid, middleOf(line)), stack);
}

/** Measures the edge that a line crosses on one stack, on the nearest slice, over the pixels of its band. */
export function measureEdgeLine(line: BandLine, stack: Stack, storedOf: StoredOf): EdgeValue {
  if (isUnscaled(stack)) return edgeNotMeasured(FLAGS.noPixelSpacing);
  const found = findLineSlice(line, stack);
  if (!found.ok) return edgeNotMeasured(found.refusal);
  const { sliceIndex, offsetMm } = found.value;
  const slice = stack.slices[sliceIndex];
  const stored = storedOf(sliceIndex);
  const nothing = (flag: Flag, n = 0): EdgeValue => ({
    ...edgeNotMeasured(flag),
    n,
    sliceIndex,
    sliceOffsetMm: offsetMm,
    sopInstanceUid: slice?.image.sopInstanceUid ?? null,
    frameNumber: frameNumber(slice),
  });
  if (slice === undefined || stored === undefined) return nothing(FLAGS.sliceMissing);
  if (stack.unit !== 'HU') return nothing(FLAGS.notHu(stack.unit));
  const samples = edgeSamples(line, slice, stored);
  if (!samples.ok) return nothing(samples.refusal);
  const n = samples.value.hu.length;
  const edge = edgeOfLine(samples.value, sizesOf(line, slice));
  if (!edge.ok) return nothing(edge.refusal, n);
  const { riseMm, riseErrorMm, crossingsMm, fromHu, toHu, atMm } = edge.value;
  return {
    riseMm,
    riseErrorMm,
    crossingsMm: crossingsMm ?? null,
    blurFwhmMm: blurOfRise(riseMm),
    blurErrorMm: blurOfRise(riseErrorMm),
    fromHu,
    toHu,
    atMm,
    n,
    sliceIndex,
    sliceOffsetMm: offsetMm,
    sopInstanceUid: slice.image.sopInstanceUid,
    frameNumber: frameNumber(slice),
    flags: [
      ...(isPlainBlur(edge.value) ? [] : [NOT_PLAIN]),
      ...(slice.image.acquisition.lossy ? [FLAGS.lossy] : []),
    ].map(({ code, text }) => ({ code, text })),
  };
}

const NOT_PLAIN: Flag = {
  code: 'not-a-plain-blur',
  text: 'The profile crosses 10 and 90 % elsewhere than a plain blur would: this kernel alters edges in another way too, and the blur stated is the nearest plain one.',
};

function isPlainBlur({ riseMm, riseErrorMm, crossingsMm }: LineEdge): boolean {
  if (crossingsMm === undefined) return true;
  return Math.abs(crossingsMm - riseMm) <= OTHER_SHAPE * riseMm + 2 * riseErrorMm;
}

/** The profile across the edge that a line crosses, for a picture of it; the refusal says why there is none. */
export function edgeProfile(
  line: BandLine,
  slice: StackSlice,
  stored: Parameters<typeof edgeSamples>[2],
): Result<LineEdge> {
  const samples = edgeSamples(line, slice, stored);
  return samples.ok ? edgeOfLine(samples.value, sizesOf(line, slice)) : samples;
}

/** What a line has on a stack on which it must not be measured, and why. */
export function edgeNotMeasured({ code, text }: Flag): EdgeValue {
  return {
    riseMm: null,
    riseErrorMm: null,
    crossingsMm: null,
    blurFwhmMm: null,
    blurErrorMm: null,
    fromHu: null,
    toHu: null,
    atMm: null,
    n: 0,
    sliceIndex: null,
    sliceOffsetMm: null,
    sopInstanceUid: null,
    frameNumber: null,
    flags: [{ code, text }],
  };
}

/** The middle of a line. */
export function middleOf({ fromMm, toMm }: Pick<BandLine, 'fromMm' | 'toMm'>): Vec3 {
  return [(fromMm[0] + toMm[0]) / 2, (fromMm[1] + toMm[1]) / 2, (fromMm[2] + toMm[2]) / 2];
}

function sizesOf({ fromMm, toMm, bandMm }: BandLine, { image }: StackSlice) {
  return {
    lengthMm: distance(fromMm, toMm),
    bandMm,
    pixelMm: Math.max(...image.grid.pixelSpacingMm),
  };
}

function frameNumber(slice: StackSlice | undefined): number | null {
  const frame = slice?.image.frame;
  return frame === undefined ? null : frame + 1;
}
