import { type Result, refuse, success } from '../result.js';
import { fitErrors } from './edgeLineErrors.js';
import { binnedProfile, crossingsMm, type ProfilePoint, scatterHu } from './edgeLineProfile.js';
import { type EdgeSamples, type FittedEdge, fitEdge } from './fitEdge.js';
import { RISE_PER_SIGMA } from './kernelTexture.js';
import { normalCdf } from './normalCdf.js';

/**
 * One edge that a line crosses. `acrossMm` of its samples runs along the line from the middle of it, `alongMm` across
 * the band; all lengths of the result are measured at right angles to the edge, however the line is slanted to it.
 */
export interface LineEdge {
  /** Level before and after the edge, HU. */
  readonly fromHu: number;
  readonly toHu: number;
  /** Where the line crosses the edge, from its start, mm. */
  readonly atMm: number;
  /** Angle between the line and the normal of the edge, degrees. */
  readonly angleDeg: number;
  /** 10–90 % distance of the blurred step that fits best, with its standard error. */
  readonly riseMm: number;
  readonly riseErrorMm: number;
  /** The same read off the measured profile; undefined where noise hides it. A plain blur has both alike. */
  readonly crossingsMm: number | undefined;
  /** What the step doesn't explain, root mean square, HU. */
  readonly residualHu: number;
  /** Measured values by distance from the edge, across it. */
  readonly profile: readonly ProfilePoint[];
}

/** What lies farther from the edge says nothing about it, mm. */
const REACH_MM = 12;
const LEAST_SAMPLES = 40;
const LEAST_STEP_HU = 20;
/** A step this many times its standard error is one. */
const LEAST_STEP_ERRORS = 5;
/** A width that is not known to half of itself is not known. */
const MOST_RELATIVE_ERROR = 0.5;
const MOST_ANGLE_DEG = 50;
/** Room that an edge needs on either side, in σ: there 98 % of the step are done. */
const ROOM_SIGMAS = 2;
/** A blur below this part of a pixel can't be told from none. */
const LEAST_SIGMA_PIXELS = 0.2;
/** The fit is begun with the edge at right angles to the line, and leaning to either side. */
const START_ANGLES = [0, 0.6, -0.6];

const REFUSALS = {
  fewPixels: ['few-pixels', 'Too few pixels: draw a longer line or make its band wider.'],
  noStep: ['no-step', 'No clear step along the line: draw it across one edge.'],
  noisy: ['noise-hides-edge', 'Noise hides how wide the edge is: make the band wider.'],
  flat: ['along-edge', 'The line runs along the edge: draw it across.'],
  short: ['too-short', 'Too short: draw the line well beyond the edge on both sides.'],
  narrow: ['narrower-than-pixels', 'The edge is narrower than the pixels can tell.'],
  several: ['several-edges', 'More than one edge along the line: draw it across one alone.'],
  uneven: ['uneven-sides', 'The sides of the edge are not even: shorten the line or its band.'],
} as const;

/**
 * The edge along a line: a step blurred by a Gaussian, along a curve of its own, fitted to all pixels of the band at
 * their own places (least squares). Its 10–90 % distance is 2.563103 σ. The standard error holds for noise whose
 * neighbours are correlated ({@link fitErrors}).
 *
 * @param pixelMm the larger side of a pixel
 * @returns refused, with what to do, where there is no single clear edge with even sides
 */
export function edgeOfLine(
  samples: EdgeSamples,
  { lengthMm, bandMm, pixelMm }: { lengthMm: number; bandMm: number; pixelMm: number },
): Result<LineEdge> {
  const no = (why: keyof typeof REFUSALS) => refuse(REFUSALS[why][0], REFUSALS[why][1]);
  if (samples.hu.length < LEAST_SAMPLES) return no('fewPixels');
  const start = bestSplit(samples);
  if (start === undefined || Math.abs(start.stepHu) < LEAST_STEP_HU) return no('noStep');
  const near = within(samples, start.atMm);
  const fitted = bestFit(near, start, Math.max(pixelMm, 0.3));
  if (fitted === undefined) return no('noStep');
  const { edge, angle, turned } = fitted;
  if (edge.sigmaMm < LEAST_SIGMA_PIXELS * pixelMm) return no('narrow');
  const profile = binnedProfile(turned, edge);
  const doubt = doubtOf(profile, edge);
  if (doubt === 'several') return no(doubt);
  const errors = fitErrors(turned, edge);
  const step = Math.abs(edge.stepHu);
  if (errors === undefined) return no('noisy');
  if (step < LEAST_STEP_HU || step < LEAST_STEP_ERRORS * errors.stepHu) return no('noStep');
  if (Math.abs(angle) > (MOST_ANGLE_DEG * Math.PI) / 180) return no('flat');
  const atMm = start.atMm + crossingOfLine(edge, angle) + lengthMm / 2;
  const lost = (bandMm / 2) * Math.abs(Math.sin(angle));
  const room = Math.min(atMm, lengthMm - atMm) * Math.cos(angle) - lost;
  if (room < ROOM_SIGMAS * edge.sigmaMm) return no('short');
  if (errors.sigmaMm > MOST_RELATIVE_ERROR * edge.sigmaMm) return no('noisy');
  if (doubt !== undefined) return no(doubt);
  const crossings = crossingsMm(profile, edge);
  return success({
    fromHu: edge.lowHu,
    toHu: edge.lowHu + edge.stepHu,
    atMm,
    angleDeg: (Math.abs(angle) * 180) / Math.PI,
    riseMm: RISE_PER_SIGMA * edge.sigmaMm,
    riseErrorMm: RISE_PER_SIGMA * errors.sigmaMm,
    crossingsMm: crossings,
    residualHu: edge.residualHu,
    profile,
  });
}

interface Split {
  readonly atMm: number;
  readonly lowHu: number;
  readonly stepHu: number;
}

/** The place along the line that parts it into the two most different halves, by least squares. */
function bestSplit({ acrossMm, hu }: EdgeSamples): Split | undefined {
  const order = Array.from(acrossMm.keys()).sort((a, b) => at(acrossMm, a) - at(acrossMm, b));
  const n = order.length;
  const least = Math.max(4, Math.floor(n / 12));
  const total = hu.reduce((sum, value) => sum + value, 0);
  let [below, gain] = [0, 0];
  let best: Split | undefined;
  order.forEach((index, place) => {
    below += at(hu, index);
    const count = place + 1;
    if (count < least || n - count < least) return;
    const [low, high] = [below / count, (total - below) / (n - count)];
    const between = (count * (n - count) * (high - low) ** 2) / n;
    if (between <= gain) return;
    gain = between;
    best = { atMm: at(acrossMm, index), lowHu: low, stepHu: high - low };
  });
  return best;
}

function within({ acrossMm, alongMm, hu }: EdgeSamples, middleMm: number): EdgeSamples {
  const keep = (list: Float64Array): Float64Array =>
    list.filter((_, index) => Math.abs(at(acrossMm, index) - middleMm) <= REACH_MM);
  return {
    acrossMm: keep(acrossMm).map((t) => t - middleMm),
    alongMm: keep(alongMm),
    hu: keep(hu),
  };
}

interface Turned {
  readonly edge: FittedEdge;
  /** From the line to the normal of the edge, radians. */
  readonly angle: number;
  /** The samples with t along the normal. */
  readonly turned: EdgeSamples;
}

/** The best of the fits from several directions; each is turned until t is at right angles to the edge. */
function bestFit(samples: EdgeSamples, start: Split, sigmaMm: number): Turned | undefined {
  let best: Turned | undefined;
  for (const first of START_ANGLES) {
    const found = fitTurned(samples, start, sigmaMm, first);
    if (found !== undefined && !(found.edge.residualHu >= (best?.edge.residualHu ?? Infinity)))
      best = found;
  }
  return best;
}

function fitTurned(
  samples: EdgeSamples,
  { lowHu, stepHu }: Split,
  sigmaMm: number,
  first: number,
): Turned | undefined {
  let angle = first;
  let from = { lowHu, stepHu, sigmaMm };
  for (let round = 0; round < 4; round += 1) {
    const turned = turnedBy(samples, angle);
    const edge = fitEdge(turned, from);
    if (edge === undefined) return undefined;
    if (Math.abs(edge.slope) < 1e-3) return { edge, angle, turned };
    angle -= Math.atan(edge.slope);
    from = edge;
  }
  const turned = turnedBy(samples, angle);
  const edge = fitEdge(turned, from);
  return edge && { edge, angle, turned };
}

function turnedBy({ acrossMm, alongMm, hu }: EdgeSamples, angle: number): EdgeSamples {
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  return {
    acrossMm: acrossMm.map((t, index) => t * c + at(alongMm, index) * s),
    alongMm: alongMm.map((along, index) => along * c - at(acrossMm, index) * s),
    hu,
  };
}

/** Where the line itself crosses the fitted curve, from the middle of the samples, mm; by Newton's method. */
function crossingOfLine({ offsetMm, slope, curvaturePerMm }: FittedEdge, angle: number): number {
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  let t = offsetMm / c;
  for (let round = 0; round < 8; round += 1) {
    const along = -t * s;
    const miss = t * c - offsetMm - slope * along - curvaturePerMm * along * along;
    const change = c + s * (slope + 2 * curvaturePerMm * along);
    if (Math.abs(change) < 1e-6) break;
    t -= miss / change;
  }
  return t;
}

/** A side may leave its level by this part of the step, or by this many standard errors. */
const UNEVEN_SHARE = 0.12;
const UNEVEN_ERRORS = 4;
/** What leaves it by more is an edge of its own. */
const OTHER_EDGE_SHARE = 0.4;
/** Width of the pieces that are looked at, mm. */
const PIECE_MM = 0.5;
/** Neighbouring pixels share their noise: so many count as one. */
const PIXELS_AS_ONE = 6;

/** Whether the profile leaves the fitted step: at its sides, where they must be level, and in the rise. */
function doubtOf(
  profile: readonly ProfilePoint[],
  { lowHu, stepHu, sigmaMm }: FittedEdge,
): 'several' | 'uneven' | undefined {
  const noiseHu = scatterHu(profile);
  let worst = 0;
  const pieces = new Map<number, { n: number; sum: number }>();
  for (const { mm, hu, n } of profile) {
    if (Math.abs(mm) < 2.5 * sigmaMm) continue;
    const piece = Math.floor(mm / PIECE_MM);
    const before = pieces.get(piece) ?? { n: 0, sum: 0 };
    const level = lowHu + stepHu * normalCdf(mm / sigmaMm);
    pieces.set(piece, { n: before.n + n, sum: before.sum + n * (hu - level) });
  }
  for (const { n, sum } of pieces.values()) {
    if (n < PIXELS_AS_ONE) continue;
    const away = Math.abs(sum / n);
    const error = noiseHu / Math.sqrt(n / PIXELS_AS_ONE);
    if (away > UNEVEN_ERRORS * error || away > OTHER_EDGE_SHARE * Math.abs(stepHu))
      worst = Math.max(worst, away / Math.abs(stepHu));
  }
  if (worst > OTHER_EDGE_SHARE) return 'several';
  return worst > UNEVEN_SHARE ? 'uneven' : undefined;
}

function at(list: Float64Array, index: number): number {
  return list[index] as number;
}
