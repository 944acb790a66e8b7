import { atPlace, type ModelProfile } from './modelProfile.js';
import { axisAt, distanceFrom, type VesselAxis } from './vesselAxis.js';
import type { KernelWindow } from './windows.js';

/** What a fit leaves over in one twelfth of the turn around the axis, in a ring of distances. */
export interface SectorResidual {
  /** Middle of the sector, from the u axis towards the v axis, and inner and outer border of the ring. */
  readonly angleDeg: number;
  readonly fromMm: number;
  readonly toMm: number;
  readonly meanHu: number;
}

const SECTORS = 12;
/** Borders of the rings relative to the struts, mm. */
const RINGS_MM = [-0.5, 0.5, 1.2, 2, 2.8];

/** Means of what a round model leaves over on one kernel, over all slices. */
export function sectorResiduals(
  { slices }: KernelWindow,
  axis: VesselAxis,
  profile: ModelProfile,
  radiusMm: number,
): readonly SectorResidual[] {
  const distance = distanceFrom(axis);
  const rings = RINGS_MM.length - 1;
  const sums = new Float64Array(rings * SECTORS);
  const counts = new Float64Array(rings * SECTORS);
  for (const { zMm, uMm, vMm, hu } of slices) {
    const [u, v] = axisAt(axis, zMm);
    for (let index = 0; index < hu.length; index += 1) {
      const [du, dv] = [(uMm[index] as number) - u, (vMm[index] as number) - v];
      const rho = distance(du, dv);
      const ring = RINGS_MM.findLastIndex((from) => rho >= radiusMm + from);
      if (ring < 0 || ring >= rings) continue;
      const turn = Math.atan2(dv, du) / (2 * Math.PI);
      const sector = Math.floor((turn + 1) * SECTORS) % SECTORS;
      const place = ring * SECTORS + sector;
      sums[place] = (sums[place] as number) + (hu[index] as number) - atPlace(profile, rho, du, dv);
      counts[place] = (counts[place] as number) + 1;
    }
  }
  return Array.from(sums, (sum, place) => ({ sum, place, count: counts[place] as number }))
    .filter(({ count }) => count >= 3)
    .map(({ sum, place, count }) => {
      const ring = Math.floor(place / SECTORS);
      return {
        angleDeg: ((place % SECTORS) + 0.5) * (360 / SECTORS),
        fromMm: radiusMm + (RINGS_MM[ring] as number),
        toMm: radiusMm + (RINGS_MM[ring + 1] as number),
        meanHu: sum / count,
      };
    });
}
