import type { PairOverride } from '../note/index.js';
import type { Stack } from '../stack/index.js';
import { asSharpness } from './asSharpness.js';
import type { PairAssessment, ReadSlice, Sharpness } from './contract.js';
import { type HeaderEvidence, headerEvidence } from './headerEvidence.js';
import { type JudgedPair, pairVerdict } from './pairVerdict.js';
import { measureShift, type Registration, shiftNotMeasured } from './registration.js';
import { type MeasuredSharpness, measureSharpness } from './sharpness.js';
import { sharpnessEvidence } from './sharpnessEvidence.js';
import { shiftEvidence } from './shiftEvidence.js';

/** Measures which of two stacks is the sharper. */
export type MeasureSharpness = (
  first: Stack,
  second: Stack,
  read: ReadSlice,
) => Promise<Sharpness | MeasuredSharpness>;

export interface AssessOptions {
  /** What the reader answers for with a reason. */
  readonly overrides?: readonly PairOverride[];
  /** Another measure of sharpness, or the same with its details kept. */
  readonly measureSharpness?: MeasureSharpness;
}

/** An assessment with all that it rests on. */
export interface DetailedAssessment extends PairAssessment, Omit<JudgedPair, 'verdict'> {
  readonly link: HeaderEvidence['link'];
  readonly shift: Registration;
  /** False when the pixels were not looked at: the verdict then rests on the headers alone. */
  readonly measured: boolean;
}

/**
 * All that speaks for and against reading two stacks as a pair, soft and sharp in measured order. Where the measure
 * can't tell, they stay in the order in which they were given, and the evidence says so. Pixels are read only where the
 * headers don't refuse the pair.
 */
export async function assessPair(
  first: Stack,
  second: Stack,
  read: ReadSlice,
  options: AssessOptions = {},
): Promise<DetailedAssessment> {
  const header = headerEvidence(first, second, options.overrides);
  if (header.refusal !== undefined) {
    return assessByHeaders(first, second, 'the headers refuse the pair', options.overrides);
  }
  const measure = options.measureSharpness ?? measureSharpness;
  const sharpness = asSharpness(await measure(first, second, read));
  const [soft, sharp] = sharpness.sharper === 'first' ? [second, first] : [first, second];
  const shift = await measureShift(soft, sharp, read);
  return judge(soft, sharp, { sharpness, shift, measured: true }, options.overrides);
}

/** The same without looking at the pixels. @param why they were not looked at, for the evidence */
export function assessByHeaders(
  first: Stack,
  second: Stack,
  why: string,
  overrides: readonly PairOverride[] = [],
): DetailedAssessment {
  const sharpness = sharpnessNotMeasured(`not measured, because ${why}`);
  const shift = shiftNotMeasured(first, second, why);
  return judge(first, second, { sharpness, shift, measured: false }, overrides);
}

function judge(
  soft: Stack,
  sharp: Stack,
  found: Pick<DetailedAssessment, 'sharpness' | 'shift' | 'measured'>,
  overrides: readonly PairOverride[] | undefined,
): DetailedAssessment {
  const header = headerEvidence(soft, sharp, overrides);
  const evidence = [
    ...header.evidence,
    shiftEvidence(found.shift, soft),
    sharpnessEvidence(found.sharpness),
  ];
  return {
    soft,
    sharp,
    evidence,
    link: header.link,
    ...pairVerdict(evidence, overrides),
    ...found,
  };
}

function sharpnessNotMeasured(text: string): Sharpness {
  return {
    decided: false,
    confidence: 0.5,
    noiseSoftHu: null,
    noiseSharpHu: null,
    frequencySoft: null,
    frequencySharp: null,
    edgeSoftMm: null,
    edgeSharpMm: null,
    text,
  };
}
