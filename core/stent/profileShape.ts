import { type Result, refuse, success } from '../result.js';
import type { ProfileSamples } from './profileSamples.js';

/** A strut as a peak of the profile: its place from the line's start and its height. */
export interface StrutPeak {
  readonly atMm: number;
  readonly peakHu: number;
}

/** What a profile shows: a stent by two peaks with a dip between, or a lumen without struts by one rise. */
export interface ProfileShape {
  readonly kind: 'stent' | 'lumen';
  /** Two for a stent, in the order of the line; none for a lumen. */
  readonly struts: readonly StrutPeak[];
  /** Half-height points that the visible width lies between, from the line's start. */
  readonly halfHeightMm: readonly [number, number];
  readonly visibleWidthMm: number;
  /** Level of the lumen: median over the middle third between the peaks; the highest value of a lumen without struts. */
  readonly lumenHu: number;
  /** Distance of the two peaks. */
  readonly peakDistanceMm: number | null;
  /** Full width of a strut at half its height on either flank, mean of both struts; null where a flank has no end. */
  readonly strutWidthMm: number | null;
  /** 10–90 % distance of the edge between lumen and strut, or lumen and surroundings, mean of both sides. */
  readonly riseMm: number | null;
}

/** A peak stands out from both sides by this part of the whole range of the profile, or it is none: interpolation rings by less. */
const LEAST_PROMINENCE = 0.1;
/** And by this many SD of a sample's noise: the highest of many samples stands out by three or four. */
const LEAST_NOISE = 5;
/** Two struts are no nearer than this, mm. */
const LEAST_APART_MM = 1;
/** Range below which a profile is flat, HU. */
const LEAST_RANGE_HU = 50;

/**
 * Reads struts, half-height points and edges off a profile.
 *
 * With two peaks: the half height of an inner flank lies midway between the peak and the level of the lumen (median of
 * the middle third between the peaks), that of an outer flank midway between the peak and the lowest value beyond
 * it. The visible width is the distance of the inner half-height points (artificial lumen narrowing as in common practice, no
 * source). Without: half height lies midway between the highest value and the lower of the two ends' levels' mean.
 *
 * @param noiseHu SD of a sample by noise ({@link profileNoiseHu}); 0 where it is not known
 */
export function profileShape(samples: ProfileSamples, noiseHu = 0): Result<ProfileShape> {
  const { atMm, hu } = samples;
  const range = Math.max(...hu) - Math.min(...hu);
  if (hu.length < 9 || !(range >= LEAST_RANGE_HU))
    return refuse('flat-profile', 'The profile shows no vessel: draw the line across one.');
  const least = Math.max(LEAST_PROMINENCE * range, LEAST_NOISE * noiseHu);
  const peaks = strutPeaks(samples, least);
  return peaks === undefined ? lumenShape(atMm, hu) : stentShape(atMm, hu, peaks);
}

type Peaks = readonly [number, number];

/** Indices of the two peaks that stand out most; undefined where there is but one. */
function strutPeaks({ atMm, hu }: ProfileSamples, least: number): Peaks | undefined {
  const all = hu
    .flatMap((value, index) =>
      index > 0 &&
      index < hu.length - 1 &&
      value > (hu[index - 1] as number) &&
      value >= (hu[index + 1] as number)
        ? [{ index, prominence: prominence(hu, index) }]
        : [],
    )
    .filter((peak) => peak.prominence >= least)
    .sort((a, b) => b.prominence - a.prominence);
  const [first] = all;
  const second = all.find(
    ({ index }) =>
      first !== undefined &&
      Math.abs((atMm[index] as number) - (atMm[first.index] as number)) >= LEAST_APART_MM,
  );
  if (first === undefined || second === undefined) return undefined;
  return [Math.min(first.index, second.index), Math.max(first.index, second.index)];
}

/** How far a peak stands above the higher of the two dips that part it from higher ground, or from the ends. */
function prominence(hu: readonly number[], peak: number): number {
  const height = hu[peak] as number;
  const dip = (step: number): number => {
    let lowest = height;
    for (let index = peak + step; index >= 0 && index < hu.length; index += step) {
      const value = hu[index] as number;
      // Of two peaks of one height the first one is the higher ground.
      if (value > height || (value === height && step < 0)) break;
      lowest = Math.min(lowest, value);
    }
    return lowest;
  };
  return height - Math.max(dip(-1), dip(1));
}

function stentShape(
  atMm: readonly number[],
  hu: readonly number[],
  [left, right]: Peaks,
): Result<ProfileShape> {
  const third = (right - left) / 3;
  const lumenHu = median(hu.slice(Math.round(left + third), Math.round(right - third) + 1));
  const sides = ([left, right] as const).map((peak, side) => {
    const inward = side === 0 ? 1 : -1;
    const { atMm: place, peakHu } = vertex(atMm, hu, peak);
    const outsideHu = Math.min(...(side === 0 ? hu.slice(0, peak) : hu.slice(peak + 1)));
    const inner = (part: number): number | undefined =>
      crossing(atMm, hu, peak, inward, lumenHu + part * (peakHu - lumenHu));
    const outer = crossing(atMm, hu, peak, -inward, (peakHu + outsideHu) / 2);
    const [half, high, low] = [inner(0.5), inner(0.9), inner(0.1)];
    return {
      strut: { atMm: place, peakHu },
      half,
      width: half === undefined || outer === undefined ? undefined : Math.abs(half - outer),
      rise: high === undefined || low === undefined ? undefined : Math.abs(high - low),
    };
  });
  const [a, b] = sides;
  if (a?.half === undefined || b?.half === undefined || !(b.half > a.half))
    return refuse(
      'no-half-height',
      'The profile does not fall to half height between the struts: no visible width.',
    );
  return success({
    kind: 'stent',
    struts: [a.strut, b.strut],
    halfHeightMm: [a.half, b.half],
    visibleWidthMm: b.half - a.half,
    lumenHu,
    peakDistanceMm: b.strut.atMm - a.strut.atMm,
    strutWidthMm: meanOfBoth(a.width, b.width),
    riseMm: meanOfBoth(a.rise, b.rise),
  });
}

function lumenShape(atMm: readonly number[], hu: readonly number[]): Result<ProfileShape> {
  const peak = hu.indexOf(Math.max(...hu));
  const lumenHu = hu[peak] as number;
  const sides = [-1, 1].map((outward) => {
    const baseHu = Math.min(...(outward < 0 ? hu.slice(0, peak + 1) : hu.slice(peak)));
    const at = (part: number): number | undefined =>
      crossing(atMm, hu, peak, outward, baseHu + part * (lumenHu - baseHu));
    const [half, high, low] = [at(0.5), at(0.9), at(0.1)];
    return {
      // A line that starts inside the lumen has no edge there.
      half: lumenHu - baseHu >= LEAST_RANGE_HU ? half : undefined,
      rise: high === undefined || low === undefined ? undefined : Math.abs(high - low),
    };
  });
  const [a, b] = sides;
  if (a?.half === undefined || b?.half === undefined)
    return refuse(
      'no-half-height',
      'The profile does not fall to half height on both sides: draw the line from outside to outside.',
    );
  return success({
    kind: 'lumen',
    struts: [],
    halfHeightMm: [a.half, b.half],
    visibleWidthMm: b.half - a.half,
    lumenHu,
    peakDistanceMm: null,
    strutWidthMm: null,
    riseMm: meanOfBoth(a.rise, b.rise),
  });
}

/** First place from `start` on where the profile passes a level downwards, straight lines between samples. */
function crossing(
  atMm: readonly number[],
  hu: readonly number[],
  start: number,
  step: number,
  level: number,
): number | undefined {
  for (let index = start; index + step >= 0 && index + step < hu.length; index += step) {
    const [high, low] = [hu[index] as number, hu[index + step] as number];
    if (high >= level && low < level) {
      const [from, to] = [atMm[index] as number, atMm[index + step] as number];
      return from + ((to - from) * (high - level)) / (high - low);
    }
  }
  return undefined;
}

/** Top of the parabola through a peak's sample and its neighbours. */
function vertex(atMm: readonly number[], hu: readonly number[], peak: number): StrutPeak {
  const [before, top, after] = [hu[peak - 1], hu[peak], hu[peak + 1]] as [number, number, number];
  const bend = before - 2 * top + after;
  const shift = bend < 0 ? (before - after) / (2 * bend) : 0;
  const stepMm = (atMm[1] as number) - (atMm[0] as number);
  return {
    atMm: (atMm[peak] as number) + shift * stepMm,
    peakHu: top - ((before - after) * shift) / 4,
  };
}

function median(values: readonly number[]): number {
  const sorted = values.toSorted((a, b) => a - b);
  const middle = (sorted.length - 1) / 2;
  return ((sorted[Math.floor(middle)] ?? 0) + (sorted[Math.ceil(middle)] ?? 0)) / 2;
}

function meanOfBoth(a: number | undefined, b: number | undefined): number | null {
  return a === undefined || b === undefined ? null : (a + b) / 2;
}
