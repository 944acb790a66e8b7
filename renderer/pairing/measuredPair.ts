import type { Vec3 } from '../../core/geometry/index.js';
import type { Evidence } from '../../core/note/index.js';
import type {
  MeasuredSharpness,
  MeasuredShift,
  PairAssessment,
  PairVerdict,
  Sharpness,
} from '../../core/pairing/index.js';
import type { KernelTexture } from '../../core/quality/index.js';
import type { Stack } from '../../core/stack/index.js';

/** A square in which noise was measured, in patient space; its sides run along rows and columns. */
export interface NoiseArea {
  readonly centreMm: Vec3;
  readonly sizeMm: number;
}

/** A noise power spectrum over the distance from frequency 0. */
export interface NoiseSpectrum {
  readonly frequencyPerMm: ArrayLike<number>;
  readonly powerHu2Mm2: ArrayLike<number>;
  /** Mean frequency, per mm. */
  readonly meanPerMm: number;
  /** Frequency of the peak, per mm, where it was taken from the same spectrum. */
  readonly peakPerMm?: number;
}

/** What was measured of the pair, as plain data. Soft and sharp are those of the plates. */
export interface MeasuredPair {
  readonly softKey: string;
  readonly sharpKey: string;
  readonly verdict: PairVerdict;
  /** In measured order: the softer stack first. */
  readonly evidence: readonly Evidence[];
  /** In measured order. */
  readonly sharpness: Sharpness;
  readonly shift: MeasuredShift;
  /** Key of the stack that was measured as the sharper one; undefined when the measure can't tell. */
  readonly measuredSharpKey: string | undefined;
  readonly areas: readonly NoiseArea[];
  /** By the key of the stack; empty where there were too few areas. */
  readonly spectra: Readonly<Record<string, NoiseSpectrum>>;
  /** Noise and blur of each kernel on its own grid, by the key of the stack; empty where there were too few areas. */
  readonly textures: Readonly<Record<string, KernelTexture>>;
  /** Number of edges that the rise distances of the textures rest on. */
  readonly edges?: number;
}

/**
 * Puts an assessment and the measure that it rests on together.
 *
 * @param soft the stack on the soft plate, which was the first of the measure
 */
export function measuredPair(
  soft: Stack,
  sharp: Stack,
  assessment: PairAssessment,
  detail: MeasuredSharpness | undefined,
): MeasuredPair {
  const { verdict, evidence, sharpness, shift } = assessment;
  const texture = detail?.noise?.texture;
  return {
    softKey: soft.key,
    sharpKey: sharp.key,
    verdict,
    evidence,
    sharpness,
    shift: { shiftMm: shift.shiftMm, places: shift.places, limitMm: shift.limitMm },
    measuredSharpKey: sharpness.decided ? assessment.sharp.key : undefined,
    areas: (detail?.areas ?? []).map(({ centreMm, sizeMm }) => ({ centreMm, sizeMm })),
    spectra:
      texture === undefined
        ? {}
        : {
            [soft.key]: { ...texture.first, meanPerMm: texture.firstPerMm },
            [sharp.key]: { ...texture.second, meanPerMm: texture.secondPerMm },
          },
    textures:
      detail?.textures === undefined
        ? {}
        : { [soft.key]: detail.textures.first, [sharp.key]: detail.textures.second },
    ...(detail?.edges && { edges: detail.edgePlaces.length }),
  };
}

/** The same after soft and sharp have changed places; undefined when it holds in one order only: then the measure could not tell. */
export function swappedPair(measured: MeasuredPair): MeasuredPair | undefined {
  if (measured.measuredSharpKey === undefined) return undefined;
  return { ...measured, softKey: measured.sharpKey, sharpKey: measured.softKey };
}
