import { length } from '../../core/geometry/index.js';
import type { Evidence } from '../../core/note/index.js';
import type { PairAssessment, PairVerdict } from '../../core/pairing/index.js';
import type { Stack } from '../../core/stack/index.js';

/** A pair as `pairs --json` prints it; null where nothing is stated or nothing could be measured. */
export interface PairEntry {
  /** Keys of the stacks, as `index` prints them; soft and sharp in measured order. */
  readonly soft: string;
  readonly sharp: string;
  readonly softSeriesInstanceUid: string;
  readonly sharpSeriesInstanceUid: string;
  /** Of both; null where the files state none, or two. */
  readonly phasePercent: number | null;
  readonly verdict: PairVerdict;
  readonly evidence: readonly Evidence[];
  readonly sharpness: {
    readonly decided: boolean;
    readonly noiseSoftHu: number | null;
    readonly noiseSharpHu: number | null;
    readonly frequencySoft: number | null;
    readonly frequencySharp: number | null;
  };
  /** Length of the measured shift. */
  readonly shiftMm: number | null;
}

/** The document of `pairs`: best first. */
export interface PairsDocument {
  readonly pairs: readonly PairEntry[];
}

export function pairsDocument(pairs: readonly PairAssessment[]): PairsDocument {
  return { pairs: pairs.map(pairEntry) };
}

function pairEntry({
  soft,
  sharp,
  verdict,
  evidence,
  sharpness,
  shift,
}: PairAssessment): PairEntry {
  const [a, b] = [acquisitionOf(soft), acquisitionOf(sharp)];
  const isOnePhase =
    a.phasePercent === undefined || b.phasePercent === undefined
      ? a.phasePercent === b.phasePercent
      : evidence.some(({ check, state }) => check === 'phase' && state === 'agrees');
  const { decided, noiseSoftHu, noiseSharpHu, frequencySoft, frequencySharp } = sharpness;
  return {
    soft: soft.key,
    sharp: sharp.key,
    softSeriesInstanceUid: a.seriesInstanceUid,
    sharpSeriesInstanceUid: b.seriesInstanceUid,
    phasePercent: isOnePhase ? (a.phasePercent ?? null) : null,
    verdict,
    evidence: evidence.map(({ check, state, text }) => ({ check, state, text })),
    sharpness: { decided, noiseSoftHu, noiseSharpHu, frequencySoft, frequencySharp },
    shiftMm: shift.shiftMm === null ? null : length(shift.shiftMm),
  };
}

function acquisitionOf({ slices: [{ image }] }: Stack) {
  return image.acquisition;
}
