import { dot, type Vec3 } from '../geometry/index.js';
import type { Stack } from '../stack/index.js';
import type { ReadSlice } from './contract.js';
import { type CorrelationSums, gradientCorrelation, likeness } from './gradientCorrelation.js';
import type { SpectrumMaker } from './gradientSpectrum.js';
import type { HuPlane, SampleGrid } from './huPlane.js';
import type { Blurs } from './placeShift.js';
import { nearestSlice, readPlane } from './planeReader.js';
import { type KeptSpectra, moveSquare, squareSpectrum } from './squareSpectrum.js';

/** What was seen of a shift along the normal. */
export interface NormalShift {
  /** Of the second against the first, mm; null where it was not measured. */
  readonly shiftMm: number | null;
  /** Why it was not measured. */
  readonly reason?: string;
}

/** Slices to either side that the first stack's slice is held against. */
const NEIGHBOURS = 2;
/** Slices further apart than this show too little of the same for their likeness to be interpolated, mm. */
const MOST_SPACING_MM = 1.5;
/**
 * One slice is more like the first stack's slice than another when what is unlike is less than this part of the other's
 * in every square. Noise of its own moves it by some hundredths; a slice further on, in a true pair, by half and more.
 */
const MOST_UNLIKE = 0.8;
const LEAST_SQUARES = 4;

/**
 * Shift along the normal: the second stack's slices around a slice of the first are held against it in all squares
 * together, and a parabola through the logarithms of the three best likenesses (exact for a Gaussian) gives the place of
 * the greatest. Where the body hardly changes from slice to slice, or noise decides, nothing is said.
 *
 * @param here the second stack at the place of the first's slice, as it was read for the shift in the plane
 * @param found the shift in the plane, and the blurs that make the kernels alike
 */
export async function normalShift(
  first: HuPlane,
  second: Stack,
  here: HuPlane,
  squares: readonly SampleGrid[],
  found: { readonly inPlaneMm: Vec3; readonly blurs: Blurs },
  maker: SpectrumMaker,
  kept: KeptSpectra,
  read: ReadSlice,
): Promise<NormalShift> {
  const not = (reason: string): NormalShift => ({ shiftMm: null, reason });
  const spacingMm = second.sliceSpacingMm;
  if (spacingMm === undefined) return not('one slice alone');
  if (spacingMm > MOST_SPACING_MM) return not('the slices lie too far apart');
  const centre = nearestSlice(second, first.alongMm).index;
  const planes: HuPlane[] = [];
  for (let step = -NEIGHBOURS; step <= NEIGHBOURS; step += 1) {
    const isHere = second.slices[centre + step]?.alongMm === here.alongMm;
    const plane = isHere ? here : await readPlane(second, centre + step, read);
    if (plane !== undefined) planes.push(plane);
  }
  if (planes.length < 2 * NEIGHBOURS + 1) return not('too few slices around');
  const places = planes.map(({ alongMm }) => alongMm - first.alongMm);
  const sums = squares.flatMap((square) => {
    const one = sumsOf(first, planes, square, found, maker, kept);
    return one === undefined ? [] : [one];
  });
  if (sums.length < LEAST_SQUARES) return not('too little structure that both show');
  const best = bestIndex(places, sums);
  const isAtEnd = best === 0 || best === places.length - 1;
  const rivals = [NEIGHBOURS, ...(isAtEnd ? [] : [best - 1, best + 1])];
  const isClear = rivals.every((rival) => rival === best || isMoreLike(best, rival, sums));
  if (!isClear) return not('neighbouring slices are too much alike');
  return isAtEnd
    ? not('the slice most like it may lie beyond those that were looked at')
    : { shiftMm: bestPlace(places, sums, best) };
}

/** Whether one slice is more like the first stack's than another is, in each square. */
function isMoreLike(
  one: number,
  other: number,
  squares: readonly (readonly CorrelationSums[])[],
): boolean {
  const unlike = (sums: readonly CorrelationSums[], index: number): number =>
    1 - likeness(sums.slice(index, index + 1));
  return squares.every((sums) => unlike(sums, one) < MOST_UNLIKE * unlike(sums, other));
}

/** One square of the first slice against the same square of each of the second's slices. */
function sumsOf(
  first: HuPlane,
  planes: readonly HuPlane[],
  square: SampleGrid,
  { inPlaneMm, blurs }: { readonly inPlaneMm: Vec3; readonly blurs: Blurs },
  maker: SpectrumMaker,
  kept: KeptSpectra,
): readonly CorrelationSums[] | undefined {
  const column = dot(inPlaneMm, square.rowDirection) / square.stepMm;
  const row = dot(inPlaneMm, square.columnDirection) / square.stepMm;
  const [wholeColumn, wholeRow] = [Math.round(column), Math.round(row)];
  const rest = { column: column - wholeColumn, row: row - wholeRow };
  const moved = moveSquare(square, wholeColumn, wholeRow);
  const a = squareSpectrum(first, square, maker, kept, blurs.first);
  if (a === undefined) return undefined;
  const sums: CorrelationSums[] = [];
  for (const plane of planes) {
    const b = squareSpectrum(plane, moved, maker, kept, blurs.second);
    if (b === undefined) return undefined;
    sums.push(gradientCorrelation(a, b, rest));
  }
  return sums;
}

function valuesOf(
  places: readonly number[],
  squares: readonly (readonly CorrelationSums[])[],
): readonly number[] {
  return places.map((_, index) => likeness(squares.flatMap((one) => one[index] ?? [])));
}

function bestIndex(
  places: readonly number[],
  squares: readonly (readonly CorrelationSums[])[],
): number {
  const values = valuesOf(places, squares);
  return values.reduce((best, value, index) => (value > (values[best] ?? 0) ? index : best), 0);
}

/** Place of the greatest likeness, between the slices. */
function bestPlace(
  places: readonly number[],
  squares: readonly (readonly CorrelationSums[])[],
  best: number,
): number {
  const values = valuesOf(places, squares);
  const at = (index: number) => ({ at: places[index] ?? 0, value: values[index] ?? 0 });
  const peak = at(best);
  const [before, after] = [at(best - 1), at(best + 1)];
  if (before.value <= 0 || after.value <= 0) return peak.at;
  return peak.at + vertex(before, peak, after);
}

interface Likeness {
  readonly at: number;
  readonly value: number;
}

/** Vertex of the parabola through three logarithms, relative to the middle one. */
function vertex(before: Likeness, peak: Likeness, after: Likeness): number {
  const [x1, x2] = [before.at - peak.at, after.at - peak.at];
  const y1 = Math.log(before.value / peak.value);
  const y2 = Math.log(after.value / peak.value);
  const curvature = (y1 / x1 - y2 / x2) / (x1 - x2);
  const slope = y1 / x1 - curvature * x1;
  return curvature < 0 ? -slope / (2 * curvature) : 0;
}
