import { type Flag, findLineSlice } from '../region/index.js';
import type { Stack } from '../stack/index.js';
import { measureProfile, notProfiled, type ProfileValue } from '../stent/measureProfile.js';
import type { StackStoredOf } from './measurePlan.js';
import type { PlanProfile } from './plan.js';

/** A line across a vessel on both kernels; null on a kernel that the plan does not name. */
export interface MeasuredProfile {
  readonly id: string;
  readonly soft: ProfileValue;
  readonly sharp: ProfileValue | null;
}

/** Measures the profiles of a plan; `notOnSharp` says why nothing may be measured on the sharp stack. */
export function measureProfiles(
  profiles: readonly PlanProfile[],
  soft: Stack,
  sharp: Stack | undefined,
  storedOf: StackStoredOf,
  notOnSharp?: Flag,
): readonly MeasuredProfile[] {
  const on = (stack: Stack, profile: PlanProfile): ProfileValue =>
    measureProfile(profile, stack, (sliceIndex) => storedOf(stack, sliceIndex));
  return profiles.map((profile) => ({
    id: profile.id,
    soft: on(soft, profile),
    sharp:
      sharp === undefined
        ? null
        : notOnSharp === undefined
          ? on(sharp, profile)
          : notProfiled(notOnSharp),
  }));
}

/** Slices of a stack that profiles lie on. */
export function profileSlices(profiles: readonly PlanProfile[], stack: Stack): readonly number[] {
  return profiles.flatMap((profile) => {
    const found = findLineSlice(profile, stack);
    return found.ok ? [found.value.sliceIndex] : [];
  });
}
