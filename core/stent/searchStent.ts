import { type Annuli, annuliOf } from './annuli.js';
import type { Uncertainty } from './annuliCovariance.js';
import { centreStep, centreWeights } from './centreStep.js';
import { leaningApodisation } from './leaningApodisation.js';
import { modelProfiles } from './modelProfile.js';
import { fitRound, type RoundFit } from './roundFit.js';
import { type StentParameters, stentSpectrum } from './stentModel.js';
import { axisAt, fitAxis, type VesselAxis } from './vesselAxis.js';
import type { KernelWindow, SliceWindow } from './windows.js';

/** A stent that was fitted, with what it was fitted to. */
export interface FoundStent {
  readonly axis: VesselAxis;
  readonly round: RoundFit;
  readonly annuli: readonly Annuli[];
  /** Centres of the slices one by one, with the standard error of each. */
  readonly centres: readonly SliceCentre[];
}

export interface SliceCentre {
  readonly zMm: number;
  readonly at: readonly [number, number];
  readonly errorMm: number;
}

/** Annuli reach this far beyond the struts, within these bounds, mm. */
const BEYOND_MM = 2.2;
const REACH_MM = [3.3, 4.5] as const;
const ROUNDS = 4;
/** Turns where size and place are nearly known. */
const LATER_ROUNDS = 2;
/** A centre moves no farther than this at once, mm. */
const MOST_MOVE_MM = 0.4;
const FAR_MOVE_MM = 0.12;
/** An axis that moves less than this has come to rest, mm: a tenth of its error. */
const NO_MOVE_MM = 0.002;
/** Heights of two kernels nearer than this are one, mm. */
const SAME_HEIGHT_MM = 0.05;

/**
 * Fits size and place in turns: what is round tells the stent, what is one-sided moves its axis. Starts from an axis that
 * may be off by a part of the radius.
 */
export function searchStent(
  windows: readonly KernelWindow[],
  start: VesselAxis,
  uncertainty: Uncertainty,
  startRadiusMm?: number,
  startParameters?: StentParameters,
): FoundStent | undefined {
  let axis = start;
  let parameters = startParameters;
  const rounds = startParameters === undefined ? ROUNDS : LATER_ROUNDS;
  let centres: readonly SliceCentre[] = [];
  let again = false;
  for (let round = 0; round < rounds; round += 1) {
    const reachMm = reachOf(parameters?.radiusMm ?? startRadiusMm ?? 1.6);
    const annuli = windows.map((window) => annuliOf(window, axis, reachMm));
    const leaning = {
      ...uncertainty,
      apodisation: leaningApodisation(uncertainty.apodisation, axis),
    };
    const fit = fitRound(annuli, leaning, again ? undefined : parameters);
    if (fit === undefined) return undefined;
    if (round === rounds - 1) return { axis, round: fit, annuli, centres };
    parameters = fit.parameters;
    const moved = movedAxis(windows, axis, parameters, leaning);
    if (moved === undefined) return undefined;
    // Sizes that were found around another place may be those of another minimum: all are tried once more.
    const [before, after] = [axis.centre, moved.axis.centre];
    const lengthMm = Math.hypot(after[0] - before[0], after[1] - before[1]);
    if (lengthMm < NO_MOVE_MM && round > 0)
      return { axis, round: fit, annuli, centres: moved.centres };
    again = lengthMm > FAR_MOVE_MM;
    axis = moved.axis;
    centres = moved.centres;
  }
  return undefined;
}

function reachOf(radiusMm: number): number {
  return Math.min(REACH_MM[1], Math.max(REACH_MM[0], radiusMm + BEYOND_MM));
}

function movedAxis(
  windows: readonly KernelWindow[],
  axis: VesselAxis,
  parameters: StentParameters,
  { apodisation }: Uncertainty,
): { readonly axis: VesselAxis; readonly centres: readonly SliceCentre[] } | undefined {
  const profiles = modelProfiles(parameters, apodisation);
  const spectrum = stentSpectrum(parameters).value;
  const weights = centreWeights(apodisation, parameters.radiusMm);
  if (weights === undefined) return undefined;
  const centres: SliceCentre[] = [];
  for (const slices of sharedHeights(windows)) {
    const [first] = slices;
    if (first === undefined) continue;
    const at = axisAt(axis, first.zMm);
    const step = centreStep(slices, at, axis, profiles, spectrum, apodisation, weights);
    if (step === undefined) return undefined;
    const length = Math.hypot(...step.moveMm);
    const part = length > MOST_MOVE_MM ? MOST_MOVE_MM / length : 1;
    centres.push({
      zMm: first.zMm,
      at: [at[0] + part * step.moveMm[0], at[1] + part * step.moveMm[1]],
      errorMm: step.errorMm,
    });
  }
  return centres.length === 0 ? undefined : { axis: fitAxis(centres), centres };
}

/** Slices of all kernels at one height; where no two kernels meet at a height, those next to each other. */
function sharedHeights(windows: readonly KernelWindow[]): readonly (readonly SliceWindow[])[] {
  const [first, ...others] = windows;
  if (first === undefined) return [];
  const within = (limitMm: number) =>
    first.slices.flatMap((slice) => {
      const rest = others.map((window) =>
        window.slices
          .toSorted((a, b) => Math.abs(a.zMm - slice.zMm) - Math.abs(b.zMm - slice.zMm))
          .find((other) => Math.abs(other.zMm - slice.zMm) <= limitMm),
      );
      return rest.every((other) => other !== undefined)
        ? [[slice, ...(rest as readonly SliceWindow[])]]
        : [];
    });
  const same = within(SAME_HEIGHT_MM);
  return same.length > 0 ? same : within(Number.POSITIVE_INFINITY);
}
