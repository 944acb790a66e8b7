import { FLAGS, measureRegion, type Shape } from '../region/index.js';
import type { Stack } from '../stack/index.js';
import type { Estimated, FittedStent, StentFit, StoredOfStack } from '../stent/index.js';
import type { Kernel } from './schema.js';
import type { StentValue } from './stentSchema.js';

/** Radius of the plain region that a fit is compared with, as a part of that of the struts (common practice, no source). */
const PLAIN_PART = 0.7;

/** The stacks that a stent was fitted on: the pair's, or its cuts. */
export interface StentStacks {
  readonly soft: Stack;
  readonly sharp: Stack;
  readonly storedOf: StoredOfStack;
}

/** What the note keeps of a fit: the numbers, what a plain region reads there, and the images that they rest on. */
export function stentValue(fit: FittedStent, stacks: StentStacks): StentValue {
  if (fit.reason !== undefined) return noStentValue(fit.reason);
  return {
    strutDiameterMm: estimated(fit.strutDiameterMm),
    lumenHu: estimated(fit.lumenHu),
    wallWidthMm: estimated(fit.wallWidthMm),
    wallHu: estimated(fit.wallHu),
    strutMassHuMm: estimated(fit.strutMassHuMm),
    blurSigmaMm: estimated(fit.blurSigmaMm),
    refitted: fit.refitted && { ...fit.refitted },
    axisMm: fit.centreMm,
    axis: fit.axis,
    tiltDeg: fit.tiltDeg,
    goodness: {
      chiSquare: fit.goodness.chiSquare,
      degreesOfFreedom: fit.goodness.degreesOfFreedom,
    },
    plain: plainOf(fit, stacks),
    slices: fit.slicesMm.length,
    images: imagesOf(fit, stacks),
    reason: null,
  };
}

/** No value of a stent, and why. */
export function noStentValue({ code, text }: NonNullable<StentValue['reason']>): StentValue {
  return {
    strutDiameterMm: null,
    lumenHu: null,
    wallWidthMm: null,
    wallHu: null,
    strutMassHuMm: null,
    blurSigmaMm: null,
    refitted: null,
    axisMm: null,
    axis: null,
    tiltDeg: null,
    goodness: null,
    plain: null,
    slices: 0,
    images: [],
    reason: { code, text },
  };
}

function estimated({ value, se }: Estimated): Estimated {
  return { value, se };
}

function plainOf(
  { centreMm, strutDiameterMm }: StentFit,
  { soft, sharp, storedOf }: StentStacks,
): StentValue['plain'] {
  const radiusMm = (PLAIN_PART * strutDiameterMm.value) / 2;
  const meanOn = (stack: Stack): number | null => {
    const { rowDirection: u, columnDirection: v } = stack.slices[0].image.grid;
    const shape: Shape = { kind: 'ellipse', centreMm, u, v, radiiMm: [radiusMm, radiusMm] };
    const stored = (index: number) => storedOf(stack, index);
    return measureRegion(shape, stack, stored, FLAGS.noStandardError).meanHu;
  };
  return { radiusMm, softHu: meanOn(soft), sharpHu: meanOn(sharp) };
}

/** None on an oblique cut, whose slices are no images of the study: the plane names those that it was cut from. */
function imagesOf(fit: StentFit, { soft, sharp }: StentStacks): StentValue['images'] {
  const kernels: readonly (readonly [Kernel, Stack])[] = [
    ['soft', soft],
    ['sharp', sharp],
  ];
  return kernels.flatMap(([kernel, stack], index) => {
    const result = fit.kernels[index];
    const image = stack.slices[result?.residual.sliceIndex ?? -1]?.image;
    if (result === undefined || image === undefined || image.sopInstanceUid === '') return [];
    return [
      {
        kernel,
        sliceIndex: result.residual.sliceIndex,
        sopInstanceUid: image.sopInstanceUid,
        frameNumber: image.frame === undefined ? null : image.frame + 1,
        noiseSdHu: result.noiseSdHu,
      },
    ];
  });
}
