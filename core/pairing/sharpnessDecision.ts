import { type Estimate, normalCdf } from '../quality/index.js';

/** What the measurements of two stacks say; each is ln(second / first), absent where it couldn't be had. */
export interface SharpnessEvidence {
  readonly noise?: Estimate;
  readonly frequency?: Estimate;
  /** Whether the mean frequency may order the two, see TextureComparison. */
  readonly frequencyTellsDirection: boolean;
  /** Whether it may say that the two are equal. */
  readonly frequencyComparable: boolean;
  readonly rise?: Estimate;
  /** What the files state of slice thickness. Thicker slices have less noise on the same kernel. */
  readonly thickness: 'same' | 'differs' | 'unknown';
  /** Loss in compression takes noise away, and its fine grain first. */
  readonly lossy: boolean;
}

/** What two stacks came to. */
export type SharpnessOutcome =
  | 'order'
  | 'same-kernel'
  | 'thickness-alone'
  | 'noise-alone'
  | 'undecided';

export interface SharpnessDecision {
  readonly outcome: SharpnessOutcome;
  readonly softer: 'first' | 'second' | undefined;
  /** Probability that the order is right; 0.5 where none is given. */
  readonly confidence: number;
  readonly text: string;
}

/**
 * Unequal by less than this, two reconstructions may still be of one kernel (other grid, other slices, other
 * interpolation): it adds to each standard error. In `npm run evidence`, pairs of one kernel on different grids
 * scatter by less than this.
 */
const SYSTEMATIC = { noise: 0.02, frequency: 0.012, rise: 0.02, riseOtherThickness: 0.03 } as const;
/** In uncertainties: what orders, what supports or contradicts. */
const DECISIVE = 4;
const SUPPORT = 2;
/**
 * Two uncertainties included. In `npm run evidence`, kernels whose cut-offs are 15 % apart differ by 0.08 to 0.14 in
 * mean frequency and by 0.15 to 0.21 in noise.
 */
const EQUAL = { frequency: 0.06, noise: 0.07 } as const;
/**
 * `npm run evidence` orders 191 of 200 pairs and none wrongly: by the rule of three (Hanley & Lippman-Hand 1983, doi
 * 10.1001/jama.1983.03330370053031) no more than 1 − 3/191 can be claimed from that.
 */
const MOST_CONFIDENCE = 0.98;

/**
 * Orders two stacks by three measurements that a wider band changes in known directions: noise goes up, its mean
 * frequency goes up, edges rise over a shorter distance.
 *
 * - Ordered when the mean frequency differs by 4 uncertainties, another one supports it by 2, and none contradicts
 *   by 2. The noise level has a voice only where the files state the same thickness.
 * - Where the mean frequency can't order them: when noise level and edges agree, each by 4.
 * - After lossy compression: only when all three agree, each by 4.
 * - One kernel when all three are equal within their uncertainties, and these are small enough to tell. Where noise
 *   is folded by the grid, only if the files state the same thickness.
 * - Thickness alone when the noise level differs, but not its frequency, which the grid must carry, nor the edges.
 * - Else undecided, with the reason.
 */
export function decideSharpness(evidence: SharpnessEvidence): SharpnessDecision {
  const votes = votesOf(evidence);
  const order = orderOf(evidence, votes);
  if (order !== undefined) return order;
  return equalityOf(evidence) ?? undecided(reasonFor(evidence, votes));
}

/** Uncertainties by which each says that the second is the sharper; negative: the first. */
interface Votes {
  readonly frequency?: number;
  readonly noise?: number;
  readonly rise?: number;
}

function votesOf(evidence: SharpnessEvidence): Votes {
  const { noise, frequency, rise } = evidence;
  const riseFloor = evidence.thickness === 'same' ? SYSTEMATIC.rise : SYSTEMATIC.riseOtherThickness;
  return {
    ...(frequency &&
      evidence.frequencyTellsDirection && { frequency: score(frequency, SYSTEMATIC.frequency) }),
    ...(noise && evidence.thickness === 'same' && { noise: score(noise, SYSTEMATIC.noise) }),
    ...(rise && { rise: -score(rise, riseFloor) }),
  };
}

function score({ value, standardError }: Estimate, systematic: number): number {
  return value / Math.hypot(standardError, systematic);
}

function orderOf({ lossy }: SharpnessEvidence, votes: Votes): SharpnessDecision | undefined {
  const leading = votes.frequency ?? votes.noise ?? 0;
  const sign = Math.sign(leading);
  const led = Math.abs(leading);
  const others = (votes.frequency === undefined ? [votes.rise] : [votes.noise, votes.rise]).flatMap(
    (vote) => (vote === undefined ? [] : [vote * sign]),
  );
  if (led < DECISIVE || others.some((vote) => vote < -SUPPORT)) return undefined;
  const support = Math.max(0, ...others);
  const needed = votes.frequency === undefined || lossy ? DECISIVE : SUPPORT;
  if (support < needed) return undefined;
  if (lossy && (others.length < 2 || others.some((vote) => vote < DECISIVE))) return undefined;
  return {
    outcome: 'order',
    softer: sign > 0 ? 'first' : 'second',
    confidence: Math.min(MOST_CONFIDENCE, normalCdf(Math.min(led, support))),
    text: sign > 0 ? 'the second is sharper' : 'the first is sharper',
  };
}

function equalityOf({
  noise,
  frequency,
  frequencyComparable,
  frequencyTellsDirection,
  rise,
  thickness,
  lossy,
}: SharpnessEvidence): SharpnessDecision | undefined {
  if (lossy || !noise || !frequency || !rise || !frequencyComparable) return undefined;
  const riseFloor = thickness === 'same' ? SYSTEMATIC.rise : SYSTEMATIC.riseOtherThickness;
  const equalTexture =
    Math.abs(frequency.value) + 2 * frequency.standardError <= EQUAL.frequency &&
    Math.abs(score(rise, riseFloor)) < DECISIVE - 1;
  if (!equalTexture) return undefined;
  const equalNoise = Math.abs(noise.value) + 2 * noise.standardError <= EQUAL.noise;
  // Folded noise of two kernels may look alike: then the level has to tell them apart, and thickness must not.
  if (!frequencyTellsDirection && !(equalNoise && thickness === 'same')) return undefined;
  if (equalNoise) return equal('same-kernel', 'same kernel');
  const noiseDiffers =
    Math.abs(noise.value) > EQUAL.noise && Math.abs(score(noise, SYSTEMATIC.noise)) >= DECISIVE;
  if (!noiseDiffers) return undefined;
  return thickness === 'same'
    ? equal('noise-alone', 'noise alone: the grain and the edges are the same')
    : equal('thickness-alone', 'thickness alone');
}

function equal(outcome: SharpnessOutcome, text: string): SharpnessDecision {
  return { outcome, softer: undefined, confidence: 0.5, text };
}

/** No order, and why. */
export function undecided(reason: string): SharpnessDecision {
  return equal('undecided', `can’t tell: ${reason}`);
}

function reasonFor(
  { lossy, noise, frequency, frequencyTellsDirection, rise }: SharpnessEvidence,
  votes: Votes,
): string {
  if (lossy) return 'after lossy compression, noise and edges don’t agree clearly enough';
  if (!noise && !rise) return 'no uniform area and no clear edge in common';
  if (!noise) return 'no uniform area in common';
  if (!rise) return 'no clear edge in common';
  const clear = [votes.frequency, votes.noise, votes.rise].flatMap((vote) =>
    vote === undefined || Math.abs(vote) < SUPPORT ? [] : [Math.sign(vote)],
  );
  if (new Set(clear).size > 1) return 'noise and edges contradict each other';
  return frequency && !frequencyTellsDirection
    ? 'the noise is finer than the pixels can carry, and the rest is not clear enough'
    : 'the differences are too small for their uncertainty';
}
