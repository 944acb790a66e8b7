import { dot, normalise, type Vec3 } from '../geometry/index.js';
import { seededUniform } from '../phantom/index.js';
import type { PairTexture } from '../quality/index.js';
import { FLAGS } from '../region/index.js';
import type { Refusal } from '../result.js';
import { isUnscaled, type Stack } from '../stack/index.js';
import type { Uncertainty } from './annuliCovariance.js';
import { type Apodisation, apodisationOf } from './apodisation.js';
import { centroidAxis } from './centroid.js';
import { kernelResults } from './kernelResults.js';
import { leaningApodisation } from './leaningApodisation.js';
import { independentPart, localNoise } from './localNoise.js';
import { type ModelProfile, modelProfiles } from './modelProfile.js';
import { refitWithNoise } from './refit.js';
import { errorAt, refusalOf } from './refusals.js';
import { searchStent } from './searchStent.js';
import { sectorResiduals } from './sectors.js';
import type { Estimated, FittedStent, StentKernel } from './stentFit.js';
import { tiltDegOf, type VesselAxis } from './vesselAxis.js';
import {
  type Frame,
  frameOf,
  inPatient,
  type KernelWindow,
  readWindow,
  type StoredOfStack,
} from './windows.js';

/** Where a stent is to be fitted. */
export interface StentPlace {
  /** A point in the lumen, patient space; it may lie off the centre. */
  readonly centreMm: Vec3;
  /** Inner diameter that the stent was made for: how far out is looked at first, no part of the result. */
  readonly nominalMm?: number | undefined;
}

/** Struts are about this thick: from a nominal inner diameter to the middle of them, mm (common practice, no source). */
const STRUT_MM = 0.1;
const REFITS = 12;
/** The local noise is taken into the weights within these factors of the variance. */
const NOISE_FACTOR = [0.5, 4] as const;
/** Blur that scanner and patient share as a rule, and the range in which a first fit's is believed, mm. */
const USUAL_BLUR_MM = 0.25;
const BLUR_MM = [0.1, 0.4] as const;
/** Planes of two kernels may lean against each other by this. */
const PARALLEL = 0.9999;

/**
 * Fits a stent to both kernels at once: a lumen in a thin ring of struts in a wall in fat, over the neighbouring slices,
 * blurred by one Gaussian and by each kernel's apodisation, which its noise power spectrum tells.
 *
 * @returns values with standard errors, or the reason why there are none
 */
export function fitStent(
  place: StentPlace,
  soft: Stack,
  sharp: Stack,
  storedOf: StoredOfStack,
  texture: PairTexture,
): FittedStent {
  if (texture.soft === null || texture.sharp === null)
    return none(
      'no-texture',
      'The noise of the kernels was not measured: their blur is not known, and no stent is fitted.',
    );
  return fitStentOn(
    place,
    [
      { stack: soft, texture: texture.soft },
      { stack: sharp, texture: texture.sharp },
    ],
    storedOf,
  );
}

/** What kernels do on images that are no slices of theirs. */
export interface SeenApodisation {
  readonly apodisation: Apodisation;
  /** SD of the noise there over that of the slices on which the textures were measured, for each kernel. */
  readonly noiseParts: readonly number[];
}

/** Turns the kernels' apodisation, told by the slices, into that of other images, for a shared blur that is expected. */
export type SeenBy = (apodisation: Apodisation, blurSigmaMm: number) => SeenApodisation;

const AS_SLICES: SeenBy = (apodisation) => ({
  apodisation,
  noiseParts: apodisation.kernels.map(() => 1),
});

/**
 * The same for one kernel alone or for two, the softer first.
 *
 * @param seenBy for images that are no slices; their stacks are given, with the textures of the slices
 */
export function fitStentOn(
  { centreMm, nominalMm }: StentPlace,
  kernels: readonly StentKernel[],
  storedOf: StoredOfStack,
  seenBy: SeenBy = AS_SLICES,
): FittedStent {
  const [first] = kernels;
  if (first === undefined) throw new RangeError('no kernels to fit');
  for (const { stack } of kernels) {
    if (isUnscaled(stack)) return { reason: FLAGS.noPixelSpacing };
    if (stack.unit !== 'HU') return { reason: FLAGS.notHu(stack.unit) };
  }
  const frame = frameOf(first.stack, centreMm);
  if (
    kernels.some(
      ({ stack }) => Math.abs(dot(frameOf(stack, centreMm).normal, frame.normal)) < PARALLEL,
    )
  )
    return none('not-parallel', 'The slices of the two stacks are not parallel: no joint fit.');
  const told = apodisationOf(kernels.map(({ texture }) => texture));
  if (!told.ok) return { reason: told.refusal };
  const expected = seenBy(told.value, USUAL_BLUR_MM);
  const windows: KernelWindow[] = [];
  for (const { stack } of kernels) {
    const window = readWindow(stack, frame, storedOf);
    if (!window.ok) return { reason: window.refusal };
    windows.push(window.value);
  }
  const start = centroidAxis(windows[0] as KernelWindow);
  if (start === undefined)
    return none(
      'no-vessel',
      'Nothing here is brighter than its surroundings: put the point into the lumen.',
    );
  const startRadiusMm = nominalMm === undefined ? undefined : (nominalMm + STRUT_MM) / 2;
  const plain: Uncertainty = {
    apodisation: expected.apodisation,
    noiseFactor: 1,
    independentPart: 1,
  };
  const rough = searchStent(windows, start, plain, startRadiusMm);
  if (rough === undefined)
    return none(
      'no-convergence',
      'The fit does not come to an end: nothing here looks like a stent.',
    );
  const noises = kernels.map((_, kernel) => {
    const profile = modelProfiles(
      rough.round.parameters,
      leaningApodisation(expected.apodisation, rough.axis),
    )[kernel];
    return profile === undefined
      ? undefined
      : localNoise(
          windows[kernel] as KernelWindow,
          rough.axis,
          profile,
          rough.round.parameters.radiusMm,
        );
  });
  const sharpest = noises.at(-1);
  const [noise] = noises;
  if (noise === undefined || sharpest === undefined)
    return none('no-surroundings', 'Too few pixels around the point: the noise here is not told.');
  // The blur is known better now than when it was only expected.
  const seen = seenBy(told.value, clamp(rough.round.parameters.blurSigmaMm, BLUR_MM));
  const sdOf = (kernel: number): number =>
    (kernels.at(kernel) as StentKernel).texture.noiseSdHu * (seen.noiseParts.at(kernel) ?? 1);
  const weighed: Uncertainty = {
    apodisation: seen.apodisation,
    noiseFactor: clamp((sharpest.sdHu / sdOf(-1)) ** 2, NOISE_FACTOR),
    independentPart: independentPart(
      Math.min(...windows.map(({ slices }) => slices.length)),
      sharpest.neighbours,
    ),
  };
  const found = searchStent(windows, rough.axis, weighed, undefined, rough.round.parameters);
  if (found === undefined)
    return none(
      'no-convergence',
      'The fit does not come to an end: nothing here looks like a stent.',
    );
  const leaning: Uncertainty = {
    ...weighed,
    apodisation: leaningApodisation(seen.apodisation, found.axis),
  };
  const profiles = modelProfiles(found.round.parameters, leaning.apodisation);
  const sectors = sectorResiduals(
    windows[0] as KernelWindow,
    found.axis,
    profiles[0] as ModelProfile,
    found.round.parameters.radiusMm,
  );
  const reason = refusalOf({
    found,
    sectors,
    softSdHu: sdOf(0),
    softLocalSdHu: noise.sdHu,
  });
  if (reason !== undefined) return { reason };
  const { parameters, covariance, lower, meanSquares } = found.round;
  const estimated = (index: number, value: number, factor = 1): Estimated => ({
    value: factor * value,
    se: factor * errorAt(covariance, index),
  });
  const worst = sectors.toSorted((a, b) => Math.abs(b.meanHu) - Math.abs(a.meanHu))[0];
  return {
    strutDiameterMm: estimated(0, parameters.radiusMm, 2),
    lumenHu: estimated(3, parameters.lumenHu),
    centreMm: inPatient(frame, ...found.axis.centre),
    axis: directionOf(frame, found.axis),
    tiltDeg: tiltDegOf(found.axis),
    wallWidthMm: estimated(1, parameters.wallWidthMm),
    wallHu: estimated(5, parameters.wallHu),
    fatHu: estimated(6, parameters.fatHu),
    strutMassHuMm: estimated(4, parameters.massHuMm),
    blurSigmaMm: estimated(2, parameters.blurSigmaMm),
    refitted: refitWithNoise(found, leaning, seedOf(parameters.radiusMm), REFITS) ?? null,
    kernels: kernelResults(
      kernels,
      windows,
      frame,
      found,
      leaning,
      profiles,
      storedOf,
      noises.map((one) => one?.sdHu ?? 0),
    ),
    goodness: {
      chiSquare: meanSquares,
      degreesOfFreedom: lower.length - (kernels.length > 1 ? 8 : 7),
      worstSector: worst ?? null,
      ringStandsOut: parameters.massHuMm / errorAt(covariance, 4),
    },
    slicesMm: (windows[0] as KernelWindow).slices.map(({ zMm }) => zMm),
  };
}

function directionOf({ u, v, normal }: Frame, { drift }: VesselAxis): Vec3 {
  const at = (axis: 0 | 1 | 2): number => normal[axis] + drift[0] * u[axis] + drift[1] * v[axis];
  return normalise([at(0), at(1), at(2)]) ?? normal;
}

/** Draws that are the same for the same fit: a value measured again has the same errors. */
function seedOf(radiusMm: number) {
  return seededUniform(Math.round(radiusMm * 1e6), REFITS);
}

function clamp(value: number, [low, high]: readonly [number, number]): number {
  return Math.min(high, Math.max(low, value));
}

function none(code: string, text: Refusal['text']): FittedStent {
  return { reason: { code, text } };
}
