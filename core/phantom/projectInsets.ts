import { viewOfEllipse } from './ellipse.js';
import type { Inset } from './scene.js';

/** Rays [from, to) that were changed. */
export interface RayRange {
  readonly from: number;
  readonly to: number;
}

/**
 * Adds the line integrals of insets (their difference from the tissue around, in units of water) to the rays
 * t = firstMm + i·stepMm of one view. Only rays that meet an inset are visited.
 */
export function projectInsets(
  insets: readonly Inset[],
  thetaRad: number,
  firstMm: number,
  stepMm: number,
  target: Float64Array,
): void {
  for (const inset of insets) {
    const { tCentre, reach, halfFactor } = viewOfEllipse(inset, thetaRad);
    const factor = (2 * halfFactor * (inset.hu - inset.aroundHu)) / 1000;
    const from = Math.max(0, Math.ceil((tCentre - reach - firstMm) / stepMm));
    const to = Math.min(target.length, Math.floor((tCentre + reach - firstMm) / stepMm) + 1);
    const square = reach * reach;
    for (let ray = from; ray < to; ray += 1) {
      const d = firstMm + ray * stepMm - tCentre;
      target[ray] = (target[ray] ?? 0) + factor * Math.sqrt(Math.max(0, square - d * d));
    }
  }
}

/**
 * The same for insets that are hardly wider than a ray's share: each ray gets the mean over its share of the width,
 * so that the mass of a thin strut is the same in each view, wherever the rays fall.
 */
export function projectSmallInsets(
  insets: readonly Inset[],
  thetaRad: number,
  firstMm: number,
  stepMm: number,
  target: Float64Array,
): RayRange {
  let lowest = target.length;
  let highest = 0;
  for (const inset of insets) {
    const { tCentre, reach, halfFactor } = viewOfEllipse(inset, thetaRad);
    const factor = (2 * halfFactor * (inset.hu - inset.aroundHu)) / 1000 / stepMm;
    const from = Math.max(0, Math.round((tCentre - reach - firstMm) / stepMm));
    const to = Math.min(target.length, Math.round((tCentre + reach - firstMm) / stepMm) + 1);
    let before = areaUpTo(firstMm + (from - 0.5) * stepMm - tCentre, reach);
    for (let ray = from; ray < to; ray += 1) {
      const after = areaUpTo(firstMm + (ray + 0.5) * stepMm - tCentre, reach);
      target[ray] = (target[ray] ?? 0) + factor * (after - before);
      before = after;
    }
    if (from < to) {
      lowest = Math.min(lowest, from);
      highest = Math.max(highest, to);
    }
  }
  return { from: lowest, to: Math.max(lowest, highest) };
}

/** ∫√(r² − d²) from the middle to d; beyond the edge it stays as it is. */
function areaUpTo(d: number, reach: number): number {
  const inside = Math.max(-reach, Math.min(reach, d));
  const root = Math.sqrt(reach * reach - inside * inside);
  return (inside * root + reach * reach * Math.asin(inside / reach)) / 2;
}
