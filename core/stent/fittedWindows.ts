import { edgeRiseMm } from './edgeRise.js';
import { FREQUENCIES } from './frequencies.js';
import type { LeastSquares } from './levenbergMarquardt.js';
import { shownRoots } from './shownRoots.js';
import type { TextureRings } from './textureRings.js';
import {
  amplitudeAt,
  BEYOND_LAST_PER_MM,
  FORM,
  type Form,
  formAt,
  lastFrequency,
  responseAt,
  searchWindows,
} from './windowSearch.js';

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
  /** Of each kernel, the measured rise of edges over that which the rings alone let expect at least; null where none was measured. */
  readonly riseParts: readonly (number | null)[];
}

/** Rings tell an end to about this, per mm. */
const END_ERROR_PER_MM = 0.02;

/** Powers of the forms that a search begins from: one that rolls off and one that breaks off lie in valleys of their own. */
const START_POWERS = [1, 0];

/**
 * Windows of a common form that have the rings' roots, and the measured rises of edges. Each kernel is sought alone first,
 * from either kind of form; from what comes nearest to its rings the search for all of them begins.
 */
export function fittedWindows(all: readonly TextureRings[]): FittedWindows | undefined {
  const alone = all.map(nearestAlone);
  const fit =
    all.length === 1
      ? alone[0]
      : searchWindows(
          all,
          all.map((rings, kernel) => {
            const point = alone[kernel]?.point;
            return point === undefined ? startForm(rings) : formAt(point, 0);
          }),
        );
  if (fit === undefined) return undefined;
  const corrected = all.map((rings, kernel) => correctedResponse(fit.point, kernel, rings));
  return {
    scale: Math.exp(fit.point[0] as number),
    scaleError: Math.sqrt(fit.covariance[0]?.[0] ?? 1),
    responses: corrected,
    misfits: corrected.map(({ misfit }) => misfit),
    riseParts: riseParts(all, fit.point),
  };
}

/** Edges are blurred beside the kernels by no less than this, mm: common practice, no source. */
const LEAST_EDGE_BLUR_MM = 0.1;

function riseParts(all: readonly TextureRings[], found: Float64Array): readonly (number | null)[] {
  const ringsOnly = all.map((rings) => ({ ...rings, rise: null }));
  const forms = all.map((_, kernel) => formAt(found, kernel));
  const point = searchWindows(ringsOnly, forms)?.point ?? found;
  return all.map(({ rise }, kernel) =>
    rise === null ? null : rise.mm / edgeRiseMm(responseAt(point, kernel), LEAST_EDGE_BLUR_MM),
  );
}

function nearestAlone(rings: TextureRings): LeastSquares | undefined {
  return START_POWERS.flatMap(
    (power) => searchWindows([rings], [startForm(rings, power)]) ?? [],
  ).toSorted((a, b) => a.squares - b.squares)[0];
}

function startForm(rings: TextureRings, power = 1): Form {
  const last = lastFrequency(rings);
  return [-0.5 / last ** 2, -0.1 / last ** 4, power, last + BEYOND_LAST_PER_MM];
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
  later[FORM + FORM * kernel] = (later[FORM + FORM * kernel] as number) + END_ERROR_PER_MM;
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
