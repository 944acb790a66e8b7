import type { Evidence } from '../note/index.js';

/** What it means for a pair that a check differs: never a pair; none without a reason; a doubt; or nothing. */
export type Weight = 'refuses' | 'needs reason' | 'doubt' | 'harmless';

/** What one check means for the verdict. */
export interface CheckMeaning {
  readonly differs: Weight;
  /** Whether the check's silence leaves a doubt about the pair. */
  readonly unknown: 'doubt' | 'harmless';
}

/**
 * Every check of a pair, in the order in which it is shown. What geometry explains (field of view, pixel and slice
 * spacing) is harmless: measuring goes by position in the patient. The weights are common practice, no source.
 */
export const CHECKS: Readonly<Record<string, CheckMeaning>> = {
  patient: { differs: 'refuses', unknown: 'doubt' },
  study: { differs: 'needs reason', unknown: 'doubt' },
  'frame of reference': { differs: 'needs reason', unknown: 'doubt' },
  acquisition: { differs: 'doubt', unknown: 'doubt' },
  phase: { differs: 'refuses', unknown: 'doubt' },
  orientation: { differs: 'doubt', unknown: 'harmless' },
  overlap: { differs: 'refuses', unknown: 'doubt' },
  'slice spacing': { differs: 'harmless', unknown: 'harmless' },
  thickness: { differs: 'doubt', unknown: 'harmless' },
  'pixel spacing': { differs: 'harmless', unknown: 'harmless' },
  'field of view': { differs: 'harmless', unknown: 'harmless' },
  tilt: { differs: 'doubt', unknown: 'harmless' },
  'tube voltage': { differs: 'doubt', unknown: 'harmless' },
  'contrast agent': { differs: 'doubt', unknown: 'harmless' },
  'lossy compression': { differs: 'doubt', unknown: 'doubt' },
  'kernel label': { differs: 'harmless', unknown: 'harmless' },
  shift: { differs: 'doubt', unknown: 'doubt' },
  sharpness: { differs: 'doubt', unknown: 'doubt' },
};

/** A check that this version does not know is a doubt unless it agrees. */
const UNKNOWN_CHECK: CheckMeaning = { differs: 'doubt', unknown: 'doubt' };

/** What a piece of evidence means for the pair. */
export function weightOf({ check, state }: Evidence): Weight | 'supports' {
  if (state === 'agrees') return 'supports';
  return (CHECKS[check] ?? UNKNOWN_CHECK)[state];
}

/** True when a piece of evidence speaks against the pair or leaves a doubt about it. */
export function speaksAgainst(evidence: Evidence): boolean {
  const weight = weightOf(evidence);
  return weight !== 'supports' && weight !== 'harmless';
}
