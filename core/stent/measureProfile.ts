import type { Vec3 } from '../geometry/index.js';
import {
  FLAGS,
  type Flag,
  findLineSlice,
  type NoiseOfStack,
  type StoredOf,
} from '../region/index.js';
import { isUnscaled, type Stack, type StackSlice } from '../stack/index.js';
import { profileNoiseHu } from './profileNoise.js';
import { type ProfileLine, type ProfileSamples, profileSamples } from './profileSamples.js';
import { type ProfileShape, profileShape, type StrutPeak } from './profileShape.js';

/** What a profile measures on one stack. A value that can't be had is null, and a flag says why. */
export interface ProfileValue {
  /** HU along the line; null where it was not sampled. */
  readonly samples: ProfileSamples | null;
  readonly kind: ProfileShape['kind'] | null;
  readonly struts: readonly StrutPeak[];
  readonly halfHeightMm: readonly [number, number] | null;
  /** Distance of the half-height points: inside the struts, or of a lumen without struts. */
  readonly visibleWidthMm: number | null;
  readonly lumenHu: number | null;
  readonly peakDistanceMm: number | null;
  readonly strutWidthMm: number | null;
  readonly riseMm: number | null;
  /** Artificial lumen narrowing, 1 − visible width / nominal inner diameter; below 0 where it looks wider. */
  readonly narrowing: number | null;
  /** Index from 0 into the stack's ordered slices; null where the line lies on none of them. */
  readonly sliceIndex: number | null;
  /** From the line's plane to the slice, along the normal, signed, mm. */
  readonly sliceOffsetMm: number | null;
  readonly sopInstanceUid: string | null;
  /** Frame of a multi-frame image, from 1; null for an image of its own. */
  readonly frameNumber: number | null;
  readonly flags: readonly Flag[];
}

const NOT_APART: Flag = {
  code: 'struts-not-apart',
  text: 'The two struts are not told apart on this kernel: no width inside them.',
};
const NO_NOMINAL: Flag = {
  code: 'no-nominal',
  text: 'No nominal inner diameter was given: no artificial lumen narrowing.',
};

const NOISE_UNKNOWN: Flag = {
  code: 'noise-unknown',
  text: 'The noise of this kernel was not measured: two ripples of it may have been taken for struts.',
};

/**
 * Measures a line across a stent or a lumen on one stack, on the nearest slice. The definitions are those of
 * {@link profileShape}; struts must stand out from the kernel's noise where it is known. With a nominal diameter, a stent is expected: a profile that shows one hump only has no width.
 */
export function measureProfile(
  line: ProfileLine,
  stack: Stack,
  storedOf: StoredOf,
  noise: NoiseOfStack = FLAGS.noStandardError,
): ProfileValue {
  if (isUnscaled(stack)) return notProfiled(FLAGS.noPixelSpacing);
  const found = findLineSlice(line, stack);
  if (!found.ok) return notProfiled(found.refusal);
  const { sliceIndex, offsetMm } = found.value;
  const slice = stack.slices[sliceIndex];
  const stored = storedOf(sliceIndex);
  const placed = {
    sliceIndex,
    sliceOffsetMm: offsetMm,
    sopInstanceUid: slice?.image.sopInstanceUid ?? null,
    frameNumber: frameNumber(slice),
  };
  if (slice === undefined || stored === undefined)
    return { ...notProfiled(FLAGS.sliceMissing), ...placed };
  if (stack.unit !== 'HU') return { ...notProfiled(FLAGS.notHu(stack.unit)), ...placed };
  const samples = profileSamples(line, slice, stored);
  if (!samples.ok) return { ...notProfiled(samples.refusal), ...placed };
  const noiseHu = 'code' in noise ? 0 : profileNoiseHu(noise, line.bandMm);
  const shape = profileShape(samples.value, noiseHu);
  if (!shape.ok) return { ...notProfiled(shape.refusal), ...placed, samples: samples.value };
  const { nominalMm } = line;
  if (nominalMm !== undefined && shape.value.kind === 'lumen')
    return { ...notProfiled(NOT_APART), ...placed, samples: samples.value };
  const isStent = shape.value.kind === 'stent';
  return {
    ...shape.value,
    ...placed,
    samples: samples.value,
    narrowing:
      isStent && nominalMm !== undefined ? 1 - shape.value.visibleWidthMm / nominalMm : null,
    flags: [
      ...(isStent && nominalMm === undefined ? [NO_NOMINAL] : []),
      ...(isStent && 'code' in noise ? [NOISE_UNKNOWN] : []),
      ...(slice.image.acquisition.lossy ? [FLAGS.lossy] : []),
    ].map(({ code, text }) => ({ code, text })),
  };
}

/** What a line has on a stack on which it must not be measured, and why. */
export function notProfiled({ code, text }: Flag): ProfileValue {
  return {
    samples: null,
    kind: null,
    struts: [],
    halfHeightMm: null,
    visibleWidthMm: null,
    lumenHu: null,
    peakDistanceMm: null,
    strutWidthMm: null,
    riseMm: null,
    narrowing: null,
    sliceIndex: null,
    sliceOffsetMm: null,
    sopInstanceUid: null,
    frameNumber: null,
    flags: [{ code, text }],
  };
}

function frameNumber(slice: StackSlice | undefined): number | null {
  const frame = slice?.image.frame;
  return frame === undefined ? null : frame + 1;
}

/** Place of a point of the profile in patient space. */
export function profilePointMm({ fromMm, toMm }: ProfileLine, atMm: number): Vec3 {
  const length = Math.hypot(toMm[0] - fromMm[0], toMm[1] - fromMm[1], toMm[2] - fromMm[2]);
  const part = length > 0 ? atMm / length : 0;
  return [
    fromMm[0] + part * (toMm[0] - fromMm[0]),
    fromMm[1] + part * (toMm[1] - fromMm[1]),
    fromMm[2] + part * (toMm[2] - fromMm[2]),
  ];
}
