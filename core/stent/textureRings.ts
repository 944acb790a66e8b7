import type { KernelTexture } from '../quality/index.js';

/** Below it, areas of 12 mm don't tell the noise of one frequency from that of another, per mm. */
const LEAST_PER_MM = 0.14;
/** Independent waves are fewer than areas have room for: areas share slices and lie close. */
const INDEPENDENT = 0.7;
/** Relative error of a ring that no number of areas takes away, and of the lowest, from which detrending took. */
const RING_ERROR = 0.01;
const LOW_RING_ERROR = 0.3;
const LOW_RING_PER_MM = 0.11;
/** Error of a ring's root relative to the highest root: rounding, spill. */
const FLOOR_ERROR = 0.008;
const LAST_RINGS_PER_MM = 0.1;
const LAST_RINGS_ERROR = 0.04;
/** Relative error of a measured edge rise on the softer kernel, and on a sharp one, whose noise and overshoot disturb it. */
const RISE_ERRORS = [0.03, 0.1] as const;

/** √(NPS/f) of a texture's rings, with the error of each. */
export interface TextureRings {
  readonly f: readonly number[];
  readonly root: Float64Array;
  readonly error: Float64Array;
  /** Edge rise that was measured, mm, and its error; null where none was. */
  readonly rise: { readonly mm: number; readonly error: number } | null;
}

/**
 * The rings of a texture that tell its kernel.
 *
 * @param kernel its place among the kernels of a fit, the softer first
 */
export function textureRings(
  { frequencyPerMm, powerHu2Mm2, areas, riseMm }: KernelTexture,
  kernel: number,
  kernels: number,
): TextureRings {
  const kept = frequencyPerMm.flatMap((f, index) => (f >= LEAST_PER_MM ? [index] : []));
  const f = kept.map((index) => frequencyPerMm[index] as number);
  const root = Float64Array.from(kept, (index) =>
    Math.sqrt(Math.max(0, powerHu2Mm2[index] as number) / (frequencyPerMm[index] as number)),
  );
  const highest = Math.max(...root);
  const error = root.map((value, index) => {
    const at = f[index] as number;
    const relative = Math.hypot(
      ringError(at, areas),
      LOW_RING_ERROR * Math.exp(-at / LOW_RING_PER_MM),
    );
    // What the border of an area spills beyond the highest frequency of the grid comes back to the last rings.
    const back = at > (f.at(-1) as number) - LAST_RINGS_PER_MM ? LAST_RINGS_ERROR : 0;
    return Math.max(1e-9, relative * value + (FLOOR_ERROR + back) * highest);
  });
  const part = RISE_ERRORS[kernels > 1 && kernel === 0 ? 0 : 1];
  return { f, root, error, rise: riseMm === null ? null : { mm: riseMm, error: part * riseMm } };
}

/** Relative standard error of a ring's root: 1/(2√n) of n independent waves, areas of 12 mm, rings of 0.08 per mm. */
export function ringError(frequencyPerMm: number, areas: number): number {
  const waves = Math.max(1, INDEPENDENT * areas * Math.PI * frequencyPerMm * 0.08 * 140);
  return Math.hypot(1 / (2 * Math.sqrt(waves)), RING_ERROR);
}
