import { measureProfileOnCut } from '../oblique/index.js';
import { findLineSlice } from '../region/index.js';
import type { Stack } from '../stack/index.js';
import { measureProfile, notProfiled, type ProfileValue } from '../stent/measureProfile.js';
import type { RegionGround } from './measureRegions.js';
import type { PlanProfile } from './plan.js';
import type { Kernel } from './schema.js';

/** A line across a vessel on both kernels; null on a kernel that the plan does not name. */
export interface MeasuredProfile {
  readonly id: string;
  readonly soft: ProfileValue;
  readonly sharp: ProfileValue | null;
}

/** Measures the profiles of a plan, each on the slices or on its oblique plane. */
export function measureProfiles(
  profiles: readonly PlanProfile[],
  { soft, sharp, storedOf, cuts, noise, notOnSharp }: RegionGround,
): readonly MeasuredProfile[] {
  const on = (stack: Stack, profile: PlanProfile, kernel: Kernel): ProfileValue => {
    if (profile.plane === undefined)
      return measureProfile(profile, stack, (index) => storedOf(stack, index), noise[kernel]);
    const cut = cuts.cutOf(profile.plane, stack);
    return cut.ok
      ? measureProfileOnCut(profile, cut.value, noise[kernel])
      : notProfiled(cut.refusal);
  };
  return profiles.map((profile) => ({
    id: profile.id,
    soft: on(soft, profile, 'soft'),
    sharp:
      sharp === undefined
        ? null
        : notOnSharp === undefined
          ? on(sharp, profile, 'sharp')
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
