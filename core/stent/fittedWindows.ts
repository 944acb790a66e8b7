import { edgeRiseMm } from './edgeRise.js';
import { FREQUENCIES } from './frequencies.js';
import { type Bounds, levenbergMarquardt } from './levenbergMarquardt.js';
import { shownRoots } from './shownRoots.js';
import type { TextureRings } from './textureRings.js';
import { rolledResponse } from './windowRoll.js';

/** Blur that the edges share beside the kernels, mean and SD, mm: common practice, no source. */
const EDGE_BLUR_MM = [0.22, 0.06] as const;

/** Windows of all kernels with one scale. */
export interface FittedWindows {
  readonly scale: number;
  readonly scaleError: number;
  readonly responses: readonly {
    readonly response: Float64Array;
    readonly endError: Float64Array;
  }[];
  /** Of each kernel, root mean square of the rings' relative misfit where its root is not small. */
  readonly misfits: readonly number[];
}

const SHAPE_BOUNDS: readonly Bounds[] = [
  { low: -12, high: 2 },
  { low: -40, high: 20 },
  { low: 0, high: 3 },
  { low: 0.3, high: 1.6 },
];

/** The end lies about where the last ring stands out; SD of that, per mm. */
const END_SD_PER_MM = 0.12;
/** Rings tell an end to about this, per mm. */
const END_ERROR_PER_MM = 0.02;

/** One scale and four numbers of form for each kernel. */
export function fittedWindows(all: readonly TextureRings[]): FittedWindows | undefined {
  const start = Float64Array.from([
    Math.log(Math.max(...all.map(({ root }) => root[0] as number))),
    ...all.flatMap(({ f, root, error }) => {
      const last = f.findLast((_, k) => (root[k] as number) > 4 * (error[k] as number)) ?? 1;
      return [-0.5 / last ** 2, -0.1 / last ** 4, 1, last + 0.06];
    }),
    EDGE_BLUR_MM[0],
  ]);
  const blur = start.length - 1;
  const bounds = [
    { low: -20, high: 20 },
    ...all.flatMap(() => SHAPE_BOUNDS),
    { low: 0.02, high: 0.6 },
  ];
  const residuals = (point: Float64Array): Float64Array =>
    Float64Array.from([
      ...all.flatMap(({ f, root, error, rise }, kernel) => {
        const roots = shownRoots(amplitudeAt(point, kernel), f);
        return [
          ...roots.map((value, k) => (value - (root[k] as number)) / (error[k] as number)),
          // Keeps the form smooth where the rings don't tell it.
          (point[1 + 4 * kernel] as number) / 4,
          (point[2 + 4 * kernel] as number) / 8,
          ((point[3 + 4 * kernel] as number) - 1) / 1.5,
          ((point[4 + 4 * kernel] as number) - (start[4 + 4 * kernel] as number)) / END_SD_PER_MM,
          // An edge tells how far W falls at the low frequencies, which the rings tell least.
          ...(rise === null
            ? []
            : [
                (edgeRiseMm(responseAt(point, kernel), point[blur] as number) - rise.mm) /
                  rise.error,
              ]),
        ];
      }),
      ((point[blur] as number) - EDGE_BLUR_MM[0]) / EDGE_BLUR_MM[1],
    ]);
  const model = (point: Float64Array) => {
    const here = residuals(point);
    const slopes = Array.from(point, (value, k) => {
      const step = 1e-4 * Math.max(1, Math.abs(value));
      const moved = Float64Array.from(point);
      moved[k] = value + step;
      const there = residuals(moved);
      return there.map((one, index) => (one - (here[index] as number)) / step);
    });
    return { residuals: here, slopes };
  };
  const fit = levenbergMarquardt(model, start, bounds);
  if (fit === undefined) return undefined;
  const scale = Math.exp(fit.point[0] as number);
  const corrected = all.map((rings, kernel) => correctedResponse(fit.point, kernel, rings));
  return {
    scale,
    scaleError: Math.sqrt(fit.covariance[0]?.[0] ?? 1),
    responses: corrected,

    misfits: corrected.map(({ misfit }) => misfit),
  };
}

function responseAt(point: Float64Array, kernel: number): Float64Array {
  const [a = 0, b = 0, power = 0, endPerMm = 0] = point.subarray(1 + 4 * kernel, 5 + 4 * kernel);
  return rolledResponse({ a, b, power, endPerMm });
}

function amplitudeAt(point: Float64Array, kernel: number): Float64Array {
  const scale = Math.exp(point[0] as number);
  return responseAt(point, kernel).map(
    (w, index) => scale * w * Math.sqrt(FREQUENCIES[index] as number),
  );
}

/** Rings whose root is below this part of the highest correct nothing. */
const LEAST_ROOT = 0.25;

/** The form times a smooth factor that brings it to the rings. */
function correctedResponse(
  point: Float64Array,
  kernel: number,
  { f, root }: TextureRings,
): { readonly response: Float64Array; readonly endError: Float64Array; readonly misfit: number } {
  const response = responseAt(point, kernel);
  const later = Float64Array.from(point);
  later[4 + 4 * kernel] = (later[4 + 4 * kernel] as number) + END_ERROR_PER_MM;
  const roots = shownRoots(amplitudeAt(point, kernel), f);
  const highest = Math.max(...root);
  const used = f.flatMap((_, k) =>
    (f[k] as number) > 0.2 && (root[k] as number) > LEAST_ROOT * highest ? [k] : [],
  );
  const ratio = used.map((k) => (root[k] as number) / Math.max(1e-9, roots[k] as number));
  const at = (index: number): number => ratio[Math.min(ratio.length - 1, Math.max(0, index))] ?? 1;
  const smooth = ratio.map(
    (_, k) => (at(k - 2) + 2 * at(k - 1) + 3 * at(k) + 2 * at(k + 1) + at(k + 2)) / 9,
  );
  const ratios = used.map((k, index) => ({ f: f[k] as number, ratio: smooth[index] as number }));
  const misfit = Math.sqrt(
    ratio.reduce((sum, one) => sum + (one - 1) ** 2, 0) / Math.max(1, ratio.length),
  );
  return {
    response: response.map((w, index) => w * factorAt(ratios, FREQUENCIES[index] as number)),
    endError: responseAt(later, kernel).map((w, index) => w - (response[index] as number)),
    misfit,
  };
}

/** Straight between the rings, running out to 1 towards frequency 0 and as the last beyond the rings. */
function factorAt(
  ratios: readonly { readonly f: number; readonly ratio: number }[],
  f: number,
): number {
  const above = ratios.findIndex((ring) => ring.f >= f);
  const [upper, lower] = [ratios[above], ratios[above - 1] ?? { f: 0, ratio: 1 }];
  if (upper === undefined) return ratios.at(-1)?.ratio ?? 1;
  return lower.ratio + ((upper.ratio - lower.ratio) * (f - lower.f)) / (upper.f - lower.f);
}
