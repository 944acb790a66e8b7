import {
  type BandLine,
  type EdgeValue,
  type Flag,
  measureEdgeLine,
  measureRegion,
  type NoiseOfStack,
  type RegionValue,
  type Shape,
} from '../region/index.js';
import { measureProfile, type ProfileLine, type ProfileValue } from '../stent/index.js';
import type { CutSlice } from './asSlice.js';
import { CUT_FLAGS } from './resampling.js';

/** A value that was measured on a cut: it names no slice, for it rests on many ({@link CutSlice.source}). */
interface PlacedValue {
  readonly sliceIndex: number | null;
  readonly sopInstanceUid: string | null;
  readonly frameNumber: number | null;
  readonly flags: readonly Flag[];
}

/**
 * Measures a shape on an oblique cut as on a slice. There is no standard error, and no edges are looked for: noise and blur
 * of the kernel were measured on the slices and are others here. Every value says that it is resampled.
 */
export function measureRegionOnCut(shape: Shape, cut: CutSlice): RegionValue {
  const value = measureRegion(shape, cut.stack, cut.storedOf, CUT_FLAGS.noStandardError);
  const flags = value.flags.map((flag) =>
    flag.code === CUT_FLAGS.edgesNotSought.code ? CUT_FLAGS.edgesNotSought : flag,
  );
  return ofCut({ ...value, flags }, cut, value.meanHu !== null);
}

/** Measures a line across a stent or a lumen on an oblique cut as on a slice. @param noise that of the slices: it is no less */
export function measureProfileOnCut(
  line: ProfileLine,
  cut: CutSlice,
  noise?: NoiseOfStack,
): ProfileValue {
  const value = measureProfile(line, cut.stack, cut.storedOf, noise);
  return ofCut(value, cut, value.samples !== null);
}

/** Measures the edge that a line crosses on an oblique cut as on a slice: its blur holds the interpolation's too. */
export function measureEdgeLineOnCut(line: BandLine, cut: CutSlice): EdgeValue {
  const value = measureEdgeLine(line, cut.stack, cut.storedOf);
  return ofCut(value, cut, value.n > 0);
}

function ofCut<T extends PlacedValue>(value: T, { resampling }: CutSlice, isMeasured: boolean): T {
  const flags = isMeasured
    ? [CUT_FLAGS.resampled(resampling), ...value.flags.map(({ code, text }) => ({ code, text }))]
    : value.flags;
  return { ...value, sliceIndex: null, sopInstanceUid: null, frameNumber: null, flags };
}
