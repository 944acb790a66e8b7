import { edgeRiseMm } from './edgeRise.js';
import { FREQUENCIES } from './frequencies.js';
import { type Bounds, type LeastSquares, levenbergMarquardt } from './levenbergMarquardt.js';
import { shownRoots } from './shownRoots.js';
import type { TextureRings } from './textureRings.js';
import { rolledResponse } from './windowRoll.js';

/** The numbers of a kernel's form in the order of {@link rolledResponse}: a, b, power, end per mm. */
export type Form = readonly [a: number, b: number, power: number, endPerMm: number];

/** How many they are. */
export const FORM = 4;

/** Blur that the edges share beside the kernels, mean and SD, mm: common practice, no source. */
const EDGE_BLUR_MM = [0.22, 0.06] as const;

const SHAPE_BOUNDS: readonly Bounds[] = [
  { low: -12, high: 2 },
  { low: -40, high: 20 },
  { low: 0, high: 3 },
  { low: 0.3, high: 1.6 },
];

/** The end lies about this far beyond the last ring that stands out, and SD of that, per mm. */
export const BEYOND_LAST_PER_MM = 0.06;
const END_SD_PER_MM = 0.12;

/** The last ring that stands out. */
export function lastFrequency({ f, root, error }: TextureRings): number {
  return f.findLast((_, k) => (root[k] as number) > 4 * (error[k] as number)) ?? 1;
}

/**
 * Least squares over one scale, four numbers of form for each kernel and the blur that edges share. The point holds the scale's
 * logarithm, the forms and the blur, in this order.
 *
 * @param forms where the search begins
 */
export function searchWindows(
  all: readonly TextureRings[],
  forms: readonly Form[],
): LeastSquares | undefined {
  const start = Float64Array.from([
    Math.log(Math.max(...all.map(({ root }) => root[0] as number))),
    ...forms.flat(),
    EDGE_BLUR_MM[0],
  ]);
  const blur = start.length - 1;
  const bounds = [
    { low: -20, high: 20 },
    ...all.flatMap(() => SHAPE_BOUNDS),
    { low: 0.02, high: 0.6 },
  ];
  const ofKernel = (point: Float64Array, kernel: number): readonly number[] =>
    residualsOf(all[kernel] as TextureRings, point, kernel);
  const ofBlur = (point: Float64Array): number =>
    ((point[blur] as number) - EDGE_BLUR_MM[0]) / EDGE_BLUR_MM[1];
  const model = (point: Float64Array) => {
    const here = all.map((_, kernel) => ofKernel(point, kernel));
    const residuals = Float64Array.from([...here.flat(), ofBlur(point)]);
    const slopes = Array.from(point, (value, k) => {
      const step = 1e-4 * Math.max(1, Math.abs(value));
      const moved = Float64Array.from(point);
      moved[k] = value + step;
      // The numbers of one kernel's form change nothing of the other's.
      const own = k === 0 || k === blur ? undefined : Math.floor((k - 1) / FORM);
      const there = here.map((same, kernel) =>
        own === undefined || own === kernel ? ofKernel(moved, kernel) : same,
      );
      return Float64Array.from(
        [...there.flat(), ofBlur(moved)],
        (one, index) => (one - (residuals[index] as number)) / step,
      );
    });
    return { residuals, slopes };
  };
  return levenbergMarquardt(model, start, bounds);
}

/** What one kernel's rings and edge say of a point, and what keeps its form smooth where they don't tell it. */
function residualsOf(rings: TextureRings, point: Float64Array, kernel: number): readonly number[] {
  const { f, root, error, rise } = rings;
  const [a, b, power, endPerMm] = formAt(point, kernel);
  const response = responseAt(point, kernel);
  const roots = shownRoots(amplitudeOf(response, point), f);
  return [
    ...Array.from(roots, (value, k) => (value - (root[k] as number)) / (error[k] as number)),
    a / 4,
    b / 8,
    (power - 1) / 1.5,
    (endPerMm - lastFrequency(rings) - BEYOND_LAST_PER_MM) / END_SD_PER_MM,
    // An edge tells how far W falls at the low frequencies, which the rings tell least.
    ...(rise === null
      ? []
      : [(edgeRiseMm(response, point.at(-1) as number) - rise.mm) / rise.error]),
  ];
}

/** The form of a kernel in a point. */
export function formAt(point: Float64Array, kernel: number): Form {
  const [a = 0, b = 0, power = 0, endPerMm = 0] = point.subarray(1 + FORM * kernel);
  return [a, b, power, endPerMm];
}

/** W of a kernel at a point of the search. */
export function responseAt(point: Float64Array, kernel: number): Float64Array {
  const [a, b, power, endPerMm] = formAt(point, kernel);
  return rolledResponse({ a, b, power, endPerMm });
}

/** √NPS of a kernel at a point of the search. */
export function amplitudeAt(point: Float64Array, kernel: number): Float64Array {
  return amplitudeOf(responseAt(point, kernel), point);
}

function amplitudeOf(response: Float64Array, point: Float64Array): Float64Array {
  const scale = Math.exp(point[0] as number);
  return response.map((w, index) => scale * w * (ROOTS[index] as number));
}

const ROOTS = FREQUENCIES.map(Math.sqrt);
