import { type KernelTexture, textureOf } from '../quality/index.js';
import { FLAGS, type Flag } from '../region/index.js';
import type { Stack } from '../stack/index.js';
import type { ReadSlice } from './contract.js';
import { evennessFloorHu, findAreas, softWindows } from './sharpnessAreas.js';
import { cellsOf } from './sharpnessCells.js';
import {
  decideSharpness,
  type SharpnessDecision,
  type SharpnessEvidence,
  undecided,
} from './sharpnessDecision.js';
import {
  compareEdges,
  type EdgeComparison,
  type EdgeSpread,
  type MeasuredEdge,
  measureEdge,
  singleSteps,
} from './sharpnessEdgeSpread.js';
import { findEdges } from './sharpnessEdges.js';
import {
  type AreaSpectrum,
  compareNoise,
  measureArea,
  type NoiseComparison,
  type UniformArea,
} from './sharpnessNoise.js';
import { type Axes, toPatient } from './sharpnessPlane.js';
import { type PlanePair, readCommonSlices } from './sharpnessSlices.js';

/** What may be chosen of the measure. */
export interface SharpnessOptions {
  /** Heights at which slices of both stacks are read; 5 by default. */
  readonly slices?: number;
}

/** Which of two stacks is the softer, with all that was measured and where. */
export interface MeasuredSharpness extends SharpnessDecision {
  readonly noise?: NoiseComparison;
  readonly edges?: EdgeComparison;
  /** Noise and blur of each stack on its own grid; none where there were too few uniform areas. */
  readonly textures?: { readonly first: KernelTexture; readonly second: KernelTexture };
  /** Uniform areas that were measured on both, and edges. */
  readonly areas: readonly UniformArea[];
  readonly edgePlaces: readonly MeasuredEdge[];
  /** Side of the smallest area that was used, inverted: finer structure of a spectrum is not resolved, per mm. */
  readonly resolutionPerMm?: number;
  /** Which of the two were compressed with loss; the numbers are then not the scanner's. */
  readonly lossy: { readonly first: boolean; readonly second: boolean };
  readonly flags: readonly Flag[];
}

const SLICES = 5;
/** Areas of a slice on which the two stacks are compared: the evenest. */
const COMPARED_PER_SLICE = 10;
/** With fewer, a jackknife says nothing of the spread. */
const LEAST_AREAS = 4;
const LEAST_EDGES = 4;
const THICKNESS_TOLERANCE_MM = 0.01;

/**
 * Measures noise level, noise texture and edge rise at the same places of two stacks, found by position in patient
 * space, and decides which is the softer. Labels are not looked at. Undecided, with the reason, where the stacks
 * have no place in common, where the evidence is too weak or where it contradicts itself.
 */
export async function measureSharpness(
  first: Stack,
  second: Stack,
  read: ReadSlice,
  { slices = SLICES }: SharpnessOptions = {},
): Promise<MeasuredSharpness> {
  const lossy = { first: isLossy(first), second: isLossy(second) };
  const flags = lossy.first || lossy.second ? [FLAGS.lossy] : [];
  const common = await readCommonSlices(first, second, read, slices);
  if ('reason' in common)
    return { ...undecided(common.reason), areas: [], edgePlaces: [], lossy, flags };
  const { axes, pairs } = common;
  const { areas: all, edges } = measurePlaces(pairs, axes);
  const areas = all.filter(({ rank }) => rank < COMPARED_PER_SLICE);
  const noise = areas.length < LEAST_AREAS ? undefined : compareNoise(areas, spacingsOf(pairs));
  const rise = edges.length < LEAST_EDGES ? undefined : compareEdges(edges);
  const textures = areas.length < LEAST_AREAS ? undefined : texturesOf(all, pairs, rise);
  const evidence: SharpnessEvidence = {
    ...(noise && { noise: noise.level, frequency: noise.texture.frequency }),
    frequencyTellsDirection: noise?.texture.tellsDirection ?? false,
    frequencyComparable: noise?.texture.comparable ?? false,
    ...(rise && { rise: rise.rise }),
    thickness: compareThickness(first, second),
    lossy: lossy.first || lossy.second,
  };
  return {
    ...decideSharpness(evidence),
    ...(noise && { noise }),
    ...(rise && { edges: rise }),
    ...(textures && { textures }),
    areas: areas.map(({ area }) => area),
    edgePlaces: edges.map(({ edge }) => edge),
    ...(areas.length > 0 && {
      resolutionPerMm: 1 / Math.min(...areas.map(({ area }) => area.sizeMm)),
    }),
    lossy,
    flags,
  };
}

function texturesOf(
  areas: readonly AreaOnBoth[],
  pairs: readonly PlanePair[],
  rise: EdgeComparison | undefined,
): MeasuredSharpness['textures'] {
  const spacings = spacingsOf(pairs);
  const on = (side: 'first' | 'second'): KernelTexture | undefined =>
    textureOf(
      areas.map((one) => ({ ...one[side], centreMm: one.area.centreMm })),
      spacings[side],
      rise?.[`${side}Mm`].value,
    );
  const [first, second] = [on('first'), on('second')];
  return first && second && { first, second };
}

/** Spacings of the planes: all slices of a stack have one grid. */
function spacingsOf(pairs: readonly PlanePair[]): {
  readonly first: readonly [number, number];
  readonly second: readonly [number, number];
} {
  const [pair] = pairs;
  if (pair === undefined) throw new RangeError('no planes in common');
  return { first: pair.first.spacingMm, second: pair.second.spacingMm };
}

function isLossy({ slices }: Stack): boolean {
  return slices.some(({ image }) => image.acquisition.lossy);
}

function compareThickness(first: Stack, second: Stack): SharpnessEvidence['thickness'] {
  const [a, b] = [first, second].map(({ slices }) => slices[0].image.acquisition.thicknessMm);
  if (a === undefined || b === undefined) return 'unknown';
  return Math.abs(a - b) <= THICKNESS_TOLERANCE_MM ? 'same' : 'differs';
}

interface AreaOnBoth {
  /** Place among the areas of its slice, evenest first, from 0. */
  readonly rank: number;
  readonly area: UniformArea;
  readonly first: AreaSpectrum;
  readonly second: AreaSpectrum;
}

interface EdgeOnBoth {
  readonly edge: MeasuredEdge;
  readonly first: EdgeSpread;
  readonly second: EdgeSpread;
}

/** Finds areas and edges on each pair of planes and measures them on both. */
function measurePlaces(
  pairs: readonly PlanePair[],
  axes: Axes,
): { readonly areas: readonly AreaOnBoth[]; readonly edges: readonly EdgeOnBoth[] } {
  const shown = pairs.flatMap((pair) => {
    const cells = cellsOf(pair);
    return cells === undefined ? [] : [{ pair, cells, windows: softWindows(cells) }];
  });
  const floorHu = evennessFloorHu(shown.map(({ windows }) => windows));
  const areas = shown.flatMap(({ pair, cells, windows }) =>
    (floorHu === undefined ? [] : findAreas(cells, windows, floorHu)).flatMap(
      (place, rank): AreaOnBoth[] => {
        const [first, second] = [measureArea(pair.first, place), measureArea(pair.second, place)];
        // An area without any noise is drawn, not scanned: it has no logarithm either.
        if (!first || !second || !(first.sdHu > 0 && second.sdHu > 0)) return [];
        const area: UniformArea = {
          centreMm: toPatient(axes, place.xMm, place.yMm, pair.first.alongMm),
          sizeMm: place.sizeMm,
          first: { meanHu: first.meanHu, sdHu: first.sdHu },
          second: { meanHu: second.meanHu, sdHu: second.sdHu },
        };
        return [{ rank, area, first, second }];
      },
    ),
  );
  const edges = shown.flatMap(({ pair, cells }) =>
    findEdges(cells).flatMap((place): EdgeOnBoth[] => {
      const [first, second] = [measureEdge(pair.first, place), measureEdge(pair.second, place)];
      if (!first || !second) return [];
      const atMm = toPatient(axes, place.xMm, place.yMm, pair.first.alongMm);
      return [{ edge: { atMm, stepHu: place.highHu - place.lowHu }, first, second }];
    }),
  );
  return { areas, edges: singleSteps(edges) };
}
