import type { Uncertainty } from './annuliCovariance.js';
import { RADII, RADIUS_STEP_MM } from './besselTables.js';
import type { ModelProfile } from './modelProfile.js';
import { residualMap } from './residualMap.js';
import { roundMeans } from './roundProblem.js';
import type { FoundStent } from './searchStent.js';
import type { KernelResult, StentKernel } from './stentFit.js';
import type { Frame, KernelWindow, StoredOfStack } from './windows.js';

/** Profiles and residuals of each kernel, for pictures of the fit. */
export function kernelResults(
  kernels: readonly StentKernel[],
  windows: readonly KernelWindow[],
  frame: Frame,
  found: FoundStent,
  leaning: Uncertainty,
  profiles: readonly ModelProfile[],
  storedOf: StoredOfStack,
  noises: readonly number[],
): readonly KernelResult[] {
  const model = roundMeans(found.annuli, leaning.apodisation, found.round.parameters);
  let taken = 0;
  return kernels.flatMap(({ stack }, kernel) => {
    const annuli = found.annuli[kernel];
    const profile = profiles[kernel];
    const nearest = windows[kernel]?.slices.toSorted(
      (a, b) => Math.abs(a.zMm) - Math.abs(b.zMm),
    )[0];
    const slice = stack.slices[nearest?.sliceIndex ?? -1];
    const stored = storedOf(stack, nearest?.sliceIndex ?? -1);
    if (
      annuli === undefined ||
      profile === undefined ||
      nearest === undefined ||
      slice === undefined ||
      stored === undefined
    )
      return [];
    const from = taken;
    taken += annuli.meanHu.length;
    return [
      {
        profile: {
          radiusMm: annuli.radiusMm,
          measuredHu: Array.from(annuli.meanHu),
          modelHu: Array.from(model.subarray(from, taken)),
        },
        model: {
          radiusMm: Array.from({ length: RADII }, (_, index) => index * RADIUS_STEP_MM),
          hu: Array.from(profile.hu),
        },
        residual: residualMap(slice, nearest.sliceIndex, stored, frame, found.axis, profile),
        noiseSdHu: noises[kernel] ?? 0,
      },
    ];
  });
}
