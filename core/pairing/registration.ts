import { add, gridNormal, scale, type Vec3 } from '../geometry/index.js';
import type { Stack } from '../stack/index.js';
import { blurDifference } from './blurDifference.js';
import { commonRange } from './commonRange.js';
import type { MeasuredShift, ReadSlice } from './contract.js';
import { makeSpectrumMaker, type SpectrumMaker } from './gradientSpectrum.js';
import { type NormalShift, normalShift } from './normalShift.js';
import { type Blurs, type PlaceShift, placeShift, type SquarePair } from './placeShift.js';
import { nearestSlice, planeAt, readPlane } from './planeReader.js';
import { commonStepMm, squareSize, structuredSquares } from './registrationPlaces.js';
import { type KeptSpectra, squareSpectrum } from './squareSpectrum.js';

/** What was measured of the shift between two stacks, place by place. */
export interface Registration extends MeasuredShift {
  readonly places: readonly PlaceShift[];
  /** Along the normal, told apart only beyond half a slice of the coarser stack. */
  readonly normal: NormalShift & { readonly limitMm: number };
  /** Why nothing could be measured. */
  readonly reason?: string;
}

/** Where slices are compared, as parts of the common range: the middle first. Sharpness is measured there too. */
const LEVELS = [0.5, 0.3, 0.7] as const;
/** Slices around a level among which the one is taken that lies nearest to a slice of the other stack. */
const AROUND = 4;
/** With fewer places than this their median is worth less than one shift for all squares together. */
const LEAST_PLACES = 5;

/**
 * Shift between two stacks in patient space, from a few slices of each: in several squares of several slices by
 * {@link placeShift}, whose median is the shift; where single squares tell too little, in all of them together. Both are sampled at the same places of the patient, so that another
 * field of view, centre or pixel spacing makes none. Along the normal it is measured on the middle slice, and counts
 * when it is more than half the coarser slice spacing.
 */
export async function measureShift(
  first: Stack,
  second: Stack,
  read: ReadSlice,
): Promise<Registration> {
  const [a, b] = [first.slices[0].image.grid, second.slices[0].image.grid];
  const limitMm = commonStepMm(a, b) / 2;
  const spacingMm = Math.max(first.sliceSpacingMm ?? 0, second.sliceSpacingMm ?? 0);
  const unmeasured = (reason: string): Registration => shiftNotMeasured(first, second, reason);
  const range = commonRange(first, second);
  if (range === undefined) return unmeasured('no slices in common');
  const size = squareSize(a, b);
  if (size === undefined) return unmeasured('the common field is too small');
  const maker = makeSpectrumMaker(size);
  const levels: SquarePair[][] = [];
  const seen = new Set<number>();
  for (const level of LEVELS) {
    const index = sliceNear(first, second, range.fromMm + level * (range.toMm - range.fromMm));
    if (seen.has(index)) continue;
    seen.add(index);
    const plane = await readPlane(first, index, read);
    const other = plane && (await planeAt(second, plane.alongMm, read));
    if (plane === undefined || other === undefined) continue;
    const squares = structuredSquares(plane, other, size);
    levels.push(squares.map((square) => ({ first: plane, second: other, square })));
  }
  if (levels.length === 0) return unmeasured('no slice could be read on both stacks');
  const pairs = levels.flat();
  const middle = levels.find((squares) => squares.length > 0) ?? [];
  const kept: KeptSpectra = new Map();
  const blurs = matchingBlurs(middle, maker, kept);
  const places = pairs.flatMap((pair) => placeShift([pair], blurs, maker, kept) ?? []);
  const whole = places.length < LEAST_PLACES ? placeShift(pairs, blurs, maker, kept) : undefined;
  if (places.length < LEAST_PLACES && whole === undefined) {
    return unmeasured('too little structure that both show');
  }
  const inPlaneMm = whole?.shiftMm ?? medianShift(places);
  const along: NormalShift =
    middle[0] === undefined
      ? { shiftMm: null, reason: 'too little structure that both show' }
      : await normalShift(
          middle[0].first,
          second,
          middle[0].second,
          middle.map(({ square }) => square),
          { inPlaneMm, blurs },
          maker,
          kept,
          read,
        );
  const isResolved = along.shiftMm !== null && Math.abs(along.shiftMm) > spacingMm / 2;
  const normalMm = scale(gridNormal(a), isResolved ? (along.shiftMm ?? 0) : 0);
  return {
    shiftMm: add(inPlaneMm, normalMm),
    // With one shift for all squares together, nothing is known of single places.
    places: whole === undefined ? places : [],
    limitMm,
    normal: { ...along, limitMm: spacingMm / 2 },
  };
}

/** A shift that was not measured, and why. */
export function shiftNotMeasured(first: Stack, second: Stack, reason: string): Registration {
  const [a, b] = [first.slices[0].image.grid, second.slices[0].image.grid];
  const spacingMm = Math.max(first.sliceSpacingMm ?? 0, second.sliceSpacingMm ?? 0);
  return {
    shiftMm: null,
    places: [],
    limitMm: commonStepMm(a, b) / 2,
    normal: { shiftMm: null, limitMm: spacingMm / 2 },
    reason,
  };
}

/** Gaussian blurs that make both kernels alike, from the power of squares together. */
function matchingBlurs(
  pairs: readonly SquarePair[],
  maker: SpectrumMaker,
  kept: KeptSpectra,
): Blurs {
  const spectra = pairs.flatMap(({ first, second, square }) => {
    const [a, b] = [
      squareSpectrum(first, square, maker, kept),
      squareSpectrum(second, square, maker, kept),
    ];
    return a && b ? [{ first: a, second: b }] : [];
  });
  const difference = blurDifference(spectra);
  return {
    first: Math.sqrt(Math.max(0, difference)),
    second: Math.sqrt(Math.max(0, -difference)),
  };
}

/** Index of the slice near a position that lies nearest to a slice of the other stack. */
function sliceNear(first: Stack, second: Stack, alongMm: number): number {
  const centre = nearestSlice(first, alongMm).index;
  let best = { index: centre, offsetMm: Infinity };
  for (let step = 0; step <= AROUND; step += 1) {
    for (const index of [centre + step, centre - step]) {
      const slice = first.slices[index];
      if (slice === undefined) continue;
      const offsetMm = Math.abs(nearestSlice(second, slice.alongMm).offsetMm);
      if (offsetMm < best.offsetMm - 1e-3) best = { index, offsetMm };
    }
  }
  return best.index;
}

/** What a place may be wrong by beyond its standard error, mm: it keeps one place from deciding alone. */
const FLOOR_MM = 0.02;

/** Median of each coordinate, places weighted by how certain they are. */
export function medianShift(
  places: readonly Pick<PlaceShift, 'shiftMm' | 'standardErrorMm'>[],
): Vec3 {
  const median = (axis: 0 | 1 | 2): number => {
    const sorted = places
      .map(({ shiftMm, standardErrorMm }) => ({
        value: shiftMm[axis],
        weight: 1 / (standardErrorMm ** 2 + FLOOR_MM ** 2),
      }))
      .sort((a, b) => a.value - b.value);
    const half = sorted.reduce((sum, { weight }) => sum + weight, 0) / 2;
    let below = 0;
    for (const [index, { value, weight }] of sorted.entries()) {
      below += weight;
      // Exactly half below: the median lies between this value and the next.
      if (below === half) return (value + (sorted[index + 1]?.value ?? value)) / 2;
      if (below > half) return value;
    }
    return 0;
  };
  return [median(0), median(1), median(2)];
}
