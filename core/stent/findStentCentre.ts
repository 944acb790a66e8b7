import type { Vec3 } from '../geometry/index.js';
import { type Result, refuse, success } from '../result.js';
import { isUnscaled, type Stack } from '../stack/index.js';
import { centroidAxis } from './centroid.js';
import { axisAt } from './vesselAxis.js';
import { frameOf, inPatient, readWindow, type StoredOfStack } from './windows.js';

/** A proposal from one click: the centre of the bright vessel and a radius of it. */
export interface StentProposal {
  readonly centreMm: Vec3;
  /** Radius at which the mean around the centre falls steepest on the softer kernel, mm; half a proposal, no measurement. */
  readonly radiusMm: number;
}

const STEP_MM = 0.2;
const REACH_MM = 4;

/**
 * Centre and radius of the bright vessel next to a click, from the softer kernel alone, quick enough to follow the pointer.
 *
 * @returns refused where nothing bright lies there
 */
export function findStentCentre(
  startMm: Vec3,
  soft: Stack,
  storedOf: StoredOfStack,
): Result<StentProposal> {
  if (isUnscaled(soft)) return refuse('no-pixel-spacing', 'The files have no pixel spacing.');
  const frame = frameOf(soft, startMm);
  const window = readWindow(soft, frame, storedOf);
  if (!window.ok) return window;
  const axis = centroidAxis(window.value);
  if (axis === undefined)
    return refuse(
      'no-vessel',
      'Nothing here is brighter than its surroundings: put the point into the lumen.',
    );
  const bins = Math.ceil(REACH_MM / STEP_MM);
  const sums = new Float64Array(bins);
  const counts = new Float64Array(bins);
  for (const { zMm, uMm, vMm, hu } of window.value.slices) {
    const [u, v] = axisAt(axis, zMm);
    hu.forEach((value, index) => {
      const place = Math.hypot((uMm[index] as number) - u, (vMm[index] as number) - v) / STEP_MM;
      const bin = Math.floor(place);
      if (bin >= bins) return;
      sums[bin] = (sums[bin] as number) + value;
      counts[bin] = (counts[bin] as number) + 1;
    });
  }
  const mean = sums.map((sum, bin) => sum / Math.max(1, counts[bin] as number));
  let [best, steepest] = [0, 0];
  for (let bin = 2; bin + 2 < bins; bin += 1) {
    const fall =
      (mean[bin - 1] as number) +
      (mean[bin - 2] as number) -
      (mean[bin + 1] as number) -
      (mean[bin + 2] as number);
    if (fall > steepest) [best, steepest] = [bin, fall];
  }
  return success({
    centreMm: inPatient(frame, ...axis.centre),
    radiusMm: (best + 0.5) * STEP_MM,
  });
}
