import { add, scale, type Vec3 } from '../geometry/index.js';
import type { SpectrumMaker } from './gradientSpectrum.js';
import type { HuPlane, SampleGrid } from './huPlane.js';
import { type PeakShift, peakShift } from './peakShift.js';
import { squareCentre } from './registrationPlaces.js';
import { type KeptSpectra, moveSquare, squareSpectrum } from './squareSpectrum.js';

/** A shift found in one square. */
export interface PlaceShift {
  readonly atMm: Vec3;
  /** Of the second against the first, patient space. */
  readonly shiftMm: Vec3;
  readonly standardErrorMm: number;
}

/** The same square of both stacks. */
export interface SquarePair {
  readonly first: HuPlane;
  readonly second: HuPlane;
  readonly square: SampleGrid;
}

/** Blurs that make two kernels alike, standard deviations in samples: one of them is 0. */
export interface Blurs {
  readonly first: number;
  readonly second: number;
}

/** Largest shift that is looked for, as a part of the square. */
const REACH = 0.125;
/** A shift less certain than this says nothing, samples. */
const MOST_ERROR = 0.2;
/** Below this the phases are as good as random. */
const LEAST_COHERENCE = 0.2;

/**
 * Shift of the second plane against the first in one square, or one shift for several squares. A shift of a sample or
 * more is measured again with the second's squares moved after it, because the fixed window draws a large shift towards
 * none.
 *
 * @param squares of one sampling step and one direction
 * @param blurs make the kernels alike: an edge on the slope of the window seems to lie elsewhere the more it is blurred
 * @returns undefined when the squares tell no shift for certain
 */
export function placeShift(
  squares: readonly SquarePair[],
  blurs: Blurs,
  maker: SpectrumMaker,
  kept: KeptSpectra,
): PlaceShift | undefined {
  const [one] = squares;
  if (one === undefined) return undefined;
  const { rowDirection, columnDirection, stepMm, size } = one.square;
  const firsts = squares.map(({ first, square }) =>
    squareSpectrum(first, square, maker, kept, blurs.first),
  );
  let moved = { column: 0, row: 0 };
  let found: PeakShift | undefined;
  for (const pass of [0, 1]) {
    const pairs = squares.flatMap(({ second, square }, index) => {
      const there = moveSquare(square, moved.column, moved.row);
      const a = firsts[index];
      const b = a && squareSpectrum(second, there, maker, kept, blurs.second);
      return a && b ? [{ first: a, second: b }] : [];
    });
    found = pairs.length > 0 ? peakShift(pairs, maker, size * REACH) : undefined;
    if (found === undefined || pass === 1) break;
    const next = { column: Math.round(found.column), row: Math.round(found.row) };
    if (next.column === 0 && next.row === 0) break;
    moved = next;
  }
  if (
    found === undefined ||
    found.standardError > MOST_ERROR ||
    found.coherence < LEAST_COHERENCE
  ) {
    return undefined;
  }
  const column = moved.column + found.column;
  const row = moved.row + found.row;
  return {
    atMm: meanPlace(squares.map(({ square }) => squareCentre(square))),
    shiftMm: add(scale(rowDirection, column * stepMm), scale(columnDirection, row * stepMm)),
    standardErrorMm: found.standardError * stepMm,
  };
}

function meanPlace(places: readonly Vec3[]): Vec3 {
  return scale(
    places.reduce((sum, place) => add(sum, place), [0, 0, 0]),
    1 / places.length,
  );
}
