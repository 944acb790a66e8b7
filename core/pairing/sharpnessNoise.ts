import type { Vec3 } from '../geometry/index.js';
import {
  addRings,
  detrendQuadratic,
  type Estimate,
  jackknife,
  meanFrequency,
  noisePower,
  QUADRATIC_TERMS,
  type RadialSpectrum,
  type RingSums,
  radialSpectrum,
  ringSums,
} from '../quality/index.js';
import type { AreaPlace } from './sharpnessAreas.js';
import { huRectangle, type Plane } from './sharpnessPlane.js';

/** Noise of one stack in one uniform area. */
export interface AreaNoise {
  readonly meanHu: number;
  /** SD about a second-order surface, HU; n − 6 degrees of freedom. */
  readonly sdHu: number;
}

/** A uniform area, found by position on both stacks: a square with sides along rows and columns. */
export interface UniformArea {
  /** On the first stack's slice. */
  readonly centreMm: Vec3;
  readonly sizeMm: number;
  readonly first: AreaNoise;
  readonly second: AreaNoise;
}

/** Rings of this width lie on the common frequency axis: what an area of 12 mm can tell apart. */
export const RING_STEP_PER_MM = 0.08;
/** Noise power on the last ring of the band that, against the peak, shows that noise goes on beyond it. */
const BEYOND_SHARE = 0.05;
/** Spacings that differ by less are one grid. */
const SAME_SPACING = 0.005;

/** What one area gives of one stack before it is known which band the two share. */
export interface AreaSpectrum extends AreaNoise {
  /** Pixels of the area; the lattice of the spectrum may be larger. */
  readonly columns: number;
  readonly rows: number;
  readonly power: ReturnType<typeof noisePower>;
}

/** Measures one area of one plane; undefined where it leaves the image or holds padding. */
export function measureArea(plane: Plane, place: AreaPlace): AreaSpectrum | undefined {
  const [columns, rows] = plane.spacingMm.map((step) =>
    Math.max(3, Math.round(place.sizeMm / step)),
  ) as [number, number];
  const column = Math.round(
    (place.xMm - plane.originMm[0]) / plane.spacingMm[0] - (columns - 1) / 2,
  );
  const row = Math.round((place.yMm - plane.originMm[1]) / plane.spacingMm[1] - (rows - 1) / 2);
  const hu = huRectangle(plane, column, row, columns, rows);
  if (hu === undefined) return undefined;
  const rest = detrendQuadratic(hu, columns, rows);
  const freedom = hu.length - QUADRATIC_TERMS;
  if (freedom < 1) return undefined;
  // Areas of 8 mm get the lattice of those of 12 mm, so that each ring has its places.
  const least = plane.spacingMm.map((step) => Math.floor(1 / (RING_STEP_PER_MM * step))) as [
    number,
    number,
  ];
  return {
    meanHu: hu.reduce((sum, value) => sum + value, 0) / hu.length,
    sdHu: Math.sqrt(rest.reduce((sum, value) => sum + value * value, 0) / freedom),
    columns,
    rows,
    power: noisePower(rest, columns, rows, plane.spacingMm, least),
  };
}

/** How the noise of two stacks compares in the same areas. */
export interface NoiseComparison {
  readonly firstHu: number;
  readonly secondHu: number;
  /** ln(second / first) of the SDs. */
  readonly level: Estimate;
  readonly texture: TextureComparison;
}

/** How its texture compares. */
export interface TextureComparison {
  /** Radial spectra of each stack up to the highest frequency that both grids carry. */
  readonly first: RadialSpectrum;
  readonly second: RadialSpectrum;
  /** Mean frequencies of these, per mm. */
  readonly firstPerMm: number;
  readonly secondPerMm: number;
  /** ln(second / first) of the mean frequencies. */
  readonly frequency: Estimate;
  /** Whether a higher mean frequency means a wider band here. Noise that is folded may look coarser than it is. */
  readonly tellsDirection: boolean;
  /** False when noise was folded differently on the two grids: then not even equality means anything. */
  readonly comparable: boolean;
}

/**
 * Compares noise level and texture over the same areas of both stacks. Errors are jackknifed over areas, each left
 * out of both stacks at once, so that what the two share cancels. Undefined for fewer than two areas.
 */
export function compareNoise(
  areas: readonly { readonly first: AreaSpectrum; readonly second: AreaSpectrum }[],
  spacings: {
    readonly first: readonly [number, number];
    readonly second: readonly [number, number];
  },
): NoiseComparison | undefined {
  const pooled = (side: 'first' | 'second', leftOut: number): number =>
    Math.sqrt(
      areas.reduce((sum, area, index) => sum + (index === leftOut ? 0 : area[side].sdHu ** 2), 0) /
        (areas.length - (leftOut < 0 ? 0 : 1)),
    );
  const level = jackknife(areas.length, (leftOut) =>
    Math.log(pooled('second', leftOut) / pooled('first', leftOut)),
  );
  const texture = compareTexture(areas, spacings);
  if (level === undefined || texture === undefined) return undefined;
  return { firstHu: pooled('first', -1), secondHu: pooled('second', -1), level, texture };
}

function compareTexture(
  areas: Parameters<typeof compareNoise>[0],
  { first: a, second: b }: Parameters<typeof compareNoise>[1],
): TextureComparison | undefined {
  const band = [
    Math.min(1 / (2 * a[0]), 1 / (2 * b[0])),
    Math.min(1 / (2 * a[1]), 1 / (2 * b[1])),
  ] as const;
  const rings = Math.floor(Math.min(...band) / RING_STEP_PER_MM + 1e-6) + 1;
  const folded = (side: 'first' | 'second'): readonly RingSums[] =>
    areas.map((area) => ringSums(area[side].power, RING_STEP_PER_MM, rings, band));
  const sums = { first: folded('first'), second: folded('second') };
  const spectrum = (side: 'first' | 'second', leftOut: number): RadialSpectrum =>
    radialSpectrum(addRings(sums[side], leftOut));
  const frequency = jackknife(areas.length, (leftOut) => {
    const [low, high] = [
      meanFrequency(spectrum('first', leftOut)),
      meanFrequency(spectrum('second', leftOut)),
    ];
    return low === undefined || high === undefined ? undefined : Math.log(high / low);
  });
  if (frequency === undefined) return undefined;
  const [first, second] = [spectrum('first', -1), spectrum('second', -1)];
  const [firstPerMm, secondPerMm] = [meanFrequency(first), meanFrequency(second)];
  if (firstPerMm === undefined || secondPerMm === undefined) return undefined;
  const limit = Math.min(...band);
  const beyond = {
    first: goesBeyond(areas, 'first', limit),
    second: goesBeyond(areas, 'second', limit),
  };
  const sameGrid = isNear(a[0], b[0]) && isNear(a[1], b[1]);
  return {
    first,
    second,
    firstPerMm,
    secondPerMm,
    frequency,
    tellsDirection: tellsDirection(beyond.first, beyond.second, frequency.value),
    comparable: sameGrid || !finerIsFolded(areas, a, b),
  };
}

/**
 * Neither reaches beyond the band: all of both is seen. One does: it is the wider, and must look so. Both do: what
 * is folded back may order them either way.
 */
function tellsDirection(first: boolean, second: boolean, logRatio: number): boolean {
  if (first && second) return false;
  if (first) return logRatio < 0;
  if (second) return logRatio > 0;
  return true;
}

/** Whether noise goes on beyond a limit, or up to it where the grid ends there and would fold the rest. */
function goesBeyond(
  areas: Parameters<typeof compareNoise>[0],
  side: 'first' | 'second',
  limitPerMm: number,
): boolean {
  const rings = Math.floor(limitPerMm / RING_STEP_PER_MM + 1e-6) + 1;
  const spectrum = radialSpectrum(
    addRings(areas.map((area) => ringSums(area[side].power, RING_STEP_PER_MM, rings))),
  );
  const last = spectrum.powerHu2Mm2.at(-1) ?? 0;
  return last > BEYOND_SHARE * Math.max(...spectrum.powerHu2Mm2);
}

function finerIsFolded(
  areas: Parameters<typeof compareNoise>[0],
  a: readonly [number, number],
  b: readonly [number, number],
): boolean {
  const firstIsFiner = Math.max(...a) < Math.max(...b);
  const [side, spacing] = firstIsFiner ? (['first', a] as const) : (['second', b] as const);
  return goesBeyond(areas, side, 1 / (2 * Math.max(...spacing)));
}

function isNear(a: number, b: number): boolean {
  return Math.abs(a / b - 1) < SAME_SPACING;
}
