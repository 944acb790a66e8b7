import type { StoredValues } from '../dicom/index.js';
import type { Vec3 } from '../geometry/index.js';
import type { Evidence } from '../note/index.js';
import type { Stack } from '../stack/index.js';

/** One acquisition; one with named reservations; or not to be read as a pair. */
export type PairVerdict = 'pair' | 'reservations' | 'refused';

/** Reads the stored values of one slice; undefined when it can't be had. Only a few slices of a stack are asked for. */
export type ReadSlice = (stack: Stack, sliceIndex: number) => Promise<StoredValues | undefined>;

/** Which of two stacks is the softer, measured in the same places of both. Labels are never interpreted. */
export interface Sharpness {
  /** False when the measure can't tell: then the order of soft and sharp is not measured. */
  readonly decided: boolean;
  /** Which of the two that were given is the sharper; undefined when the measure can't tell. */
  readonly sharper?: 'first' | 'second';
  /** Probability that the order is right, 0.5 to 1. */
  readonly confidence: number;
  /** SD in uniform areas, HU; null where no such area was found. Undecided, 'soft' is the first and 'sharp' the second. */
  readonly noiseSoftHu: number | null;
  readonly noiseSharpHu: number | null;
  /** Mean frequency of the noise power spectrum, per mm. */
  readonly frequencySoft: number | null;
  readonly frequencySharp: number | null;
  /** 10–90 % edge rise distance on edges that both show, mm. */
  readonly edgeSoftMm: number | null;
  readonly edgeSharpMm: number | null;
  /** What it came to, in words: 'the second is sharper', 'same kernel', 'thickness alone', 'can't tell'. */
  readonly text: string;
}

/** Shift between two stacks measured in several places. */
export interface MeasuredShift {
  /** Median shift of the second against the first, patient space, mm; null when it can't be measured. */
  readonly shiftMm: Vec3 | null;
  readonly places: readonly { readonly atMm: Vec3; readonly shiftMm: Vec3 }[];
  /** Half a pixel of the coarser stack, mm: above it the shift is a reservation. */
  readonly limitMm: number;
}

/** Two stacks with all that speaks for and against reading them as a pair. */
export interface PairAssessment {
  readonly soft: Stack;
  readonly sharp: Stack;
  readonly verdict: PairVerdict;
  readonly evidence: readonly Evidence[];
  readonly sharpness: Sharpness;
  readonly shift: MeasuredShift;
}
