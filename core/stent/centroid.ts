import { fitAxis, type VesselAxis } from './vesselAxis.js';
import type { KernelWindow, SliceWindow } from './windows.js';

/** Radius within which the bright part of a vessel is sought, mm: the widest stent and its blur. */
const WITHIN_MM = 2.8;
const MOST_MOVES = 30;
/** The bright part is what lies above this part of the way from the surroundings to the brightest pixels. */
const LEVEL = 0.45;

/**
 * The axis of a bright vessel near the start, from the softer kernel: on each slice the centre of what is bright moves
 * until it stays (mean shift, Fukunaga & Hostetler 1975, doi 10.1109/TIT.1975.1055330). Undefined where nothing is bright.
 */
export function centroidAxis(window: KernelWindow): VesselAxis | undefined {
  const start = window.slices.toSorted((a, b) => Math.abs(a.zMm) - Math.abs(b.zMm));
  const [first] = start;
  if (first === undefined) return undefined;
  const middle = settle(first, [0, 0]);
  if (middle === undefined) return undefined;
  const points = window.slices.flatMap((slice) => {
    const at = settle(slice, middle);
    return at === undefined ? [] : [{ zMm: slice.zMm, at }];
  });
  return points.length === 0 ? undefined : fitAxis(points);
}

/** Where the centre of what is bright comes to rest on one slice. */
function settle(
  { uMm, vMm, hu }: SliceWindow,
  start: readonly [number, number],
): readonly [number, number] | undefined {
  let at = start;
  const level = brightLevel({ uMm, vMm, hu }, start);
  if (level === undefined) return undefined;
  for (let move = 0; move < MOST_MOVES; move += 1) {
    let [u, v, total] = [0, 0, 0];
    for (let index = 0; index < hu.length; index += 1) {
      const du = (uMm[index] as number) - at[0];
      const dv = (vMm[index] as number) - at[1];
      const rho = Math.hypot(du, dv);
      if (rho > WITHIN_MM) continue;
      // Fades out towards the border, so that the centre moves without jumps from pixel to pixel.
      const weight =
        Math.max(0, (hu[index] as number) - level) * Math.min(1, (WITHIN_MM - rho) / 0.6);
      u += weight * (uMm[index] as number);
      v += weight * (vMm[index] as number);
      total += weight;
    }
    if (!(total > 0)) return undefined;
    const next = [u / total, v / total] as const;
    const moved = Math.hypot(next[0] - at[0], next[1] - at[1]);
    at = next;
    if (moved < 0.01) break;
  }
  return at;
}

function brightLevel(
  { uMm, vMm, hu }: Pick<SliceWindow, 'uMm' | 'vMm' | 'hu'>,
  [u, v]: readonly [number, number],
): number | undefined {
  const near: number[] = [];
  for (let index = 0; index < hu.length; index += 1)
    if (Math.hypot((uMm[index] as number) - u, (vMm[index] as number) - v) <= 3.5)
      near.push(hu[index] as number);
  near.sort((a, b) => a - b);
  const low = near[Math.floor(near.length * 0.15)];
  const high = near[Math.floor(near.length * 0.95)];
  if (low === undefined || high === undefined || high - low < 80) return undefined;
  return low + LEVEL * (high - low);
}
