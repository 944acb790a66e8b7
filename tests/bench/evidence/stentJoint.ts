import { type FittedOn, fitOn, type GridCase, gridPair, startOf } from './stentGrid.js';
import { strutDiameterMm } from './stentScene.js';
import { withTrueWindows } from './stentTrueWindows.js';

/** Fits of the same stents on both kernels and on one, pair by pair. */
export interface JointGain {
  /** Stents that each could fit. */
  readonly stents: number;
  readonly diameterMm: PairedErrors;
  readonly lumenHu: PairedErrors;
}

/** Absolute errors of two fits of the same stents. */
export interface PairedErrors {
  readonly medianJoint: number;
  readonly medianSingle: number;
  /** Mean of what the error of the single fit is larger by, with its standard error. */
  readonly gain: number;
  readonly gainError: number;
  /** Root mean square of the difference of the two values. */
  readonly apart: number;
}

/** Compares the fits on both kernels with those on one of them. */
export function jointGain(
  cases: readonly Pick<GridCase, 'truth' | 'fits'>[],
  side: Exclude<FittedOn, 'both'>,
): JointGain {
  const shared = cases.flatMap(({ truth, fits }) => {
    const [joint, single] = [fits.both, fits[side]];
    if (joint === undefined || single === undefined) return [];
    if (joint.reason !== undefined || single.reason !== undefined) return [];
    return [{ truth, joint, single }];
  });
  return {
    stents: shared.length,
    diameterMm: pairedErrors(
      shared.map(({ truth, joint, single }) => [
        joint.strutDiameterMm.value - strutDiameterMm(truth),
        single.strutDiameterMm.value - strutDiameterMm(truth),
      ]),
    ),
    lumenHu: pairedErrors(
      shared.map(({ truth, joint, single }) => [
        joint.lumenHu.value - truth.lumenHu,
        single.lumenHu.value - truth.lumenHu,
      ]),
    ),
  };
}

function pairedErrors(all: readonly (readonly [joint: number, single: number])[]): PairedErrors {
  const n = all.length;
  const mean = (values: readonly number[]): number => values.reduce((sum, v) => sum + v, 0) / n;
  const median = (values: readonly number[]): number =>
    values.toSorted((a, b) => a - b)[Math.floor(n / 2)] ?? Number.NaN;
  const gains = all.map(([joint, single]) => Math.abs(single) - Math.abs(joint));
  const gain = mean(gains);
  return {
    medianJoint: median(all.map(([joint]) => Math.abs(joint))),
    medianSingle: median(all.map(([, single]) => Math.abs(single))),
    gain,
    gainError: Math.sqrt(mean(gains.map((one) => (one - gain) ** 2)) / Math.max(1, n - 1)),
    apart: Math.sqrt(mean(all.map(([joint, single]) => (joint - single) ** 2))),
  };
}

/**
 * The same stents fitted with the windows that the images were made with instead of those that their noise tells: what a fit
 * could come to if the windows were known.
 */
export async function gainWithTrueWindows(batch: number, acquisitions: number): Promise<JointGain> {
  const cases: Pick<GridCase, 'truth' | 'fits'>[] = [];
  for (let index = 0; index < acquisitions; index += 1) {
    const { pair, stents, kernels, uniform } = await gridPair(batch, index);
    for (const truth of stents) {
      const start = startOf(truth, uniform);
      const fits = Object.fromEntries(
        (['both', 'sharp'] as const).map((side) => [
          side,
          fitOn(pair, side, start, withTrueWindows(side, kernels)),
        ]),
      );
      cases.push({ truth, fits });
    }
  }
  return jointGain(cases, 'sharp');
}

/** In one line. */
export function gainInWords(
  name: string,
  { stents, diameterMm: d, lumenHu: l }: JointGain,
): string {
  return `  both against ${name} alone, ${stents} stents: median ${d.medianJoint.toFixed(4)} and ${d.medianSingle.toFixed(4)} mm, nearer by ${d.gain.toFixed(4)} ± ${d.gainError.toFixed(4)}, values apart ${d.apart.toFixed(4)}; ${l.medianJoint.toFixed(1)} and ${l.medianSingle.toFixed(1)} HU, nearer by ${l.gain.toFixed(2)} ± ${l.gainError.toFixed(2)}, values apart ${l.apart.toFixed(1)}`;
}
