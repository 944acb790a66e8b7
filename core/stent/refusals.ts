import type { Refusal } from '../result.js';
import { BOUNDS } from './roundFit.js';
import type { FoundStent } from './searchStent.js';
import type { SectorResidual } from './sectors.js';
import type { StentParameters } from './stentModel.js';
import { axisAt, tiltDegOf } from './vesselAxis.js';

/** What is looked at before a value is given. */
export interface Evidence {
  readonly found: FoundStent;
  /** Sectors of the softest kernel, and its SD in uniform areas and around the stent, HU. */
  readonly sectors: readonly SectorResidual[];
  readonly softSdHu: number;
  readonly softLocalSdHu: number;
}

/** An ellipse of known tilt carries a leaning vessel up to here. */
export const MOST_TILT_DEG = 25;
/** The ring must stand out by this many standard errors, and have this line mass at least, HU·mm. */
const LEAST_RING_ERRORS = 5;
const LEAST_MASS = 100;
/** What is left over in a sector may be this many SD of a pixel, and this much in any case, HU. */
const MOST_SECTOR_SD = 3;
const ALWAYS_SECTOR_HU = 50;
/** Surroundings may vary by this factor more than uniform areas do. */
const MOST_LOCAL_NOISE = 1.9;
/** Sum of squares a mean may have: the weights know noise and kernels, not wires and shapes that are not quite round. */
const MOST_SQUARES_PER_MEAN = 10;
/** Centres of the slices may lie beside the straight axis by this, mm, and by this many of their errors. */
const MOST_OFF_AXIS_MM = 0.15;
const MOST_OFF_AXIS_ERRORS = 4;
/** A lumen holds no less and no more than this, HU. */
const LUMEN_HU = [-100, 850] as const;
/** Scanner and patient blur by more than this whatever the kernel, SD, mm: common practice, no source. */
const LEAST_BLUR_MM = 0.09;
/** Standard errors above these are no measurement: mm of diameter and HU of lumen. */
const MOST_ERRORS = [0.15, 35] as const;

const text = {
  tilt: (degrees: number) =>
    `The vessel runs ${degrees.toFixed(0)}° oblique to the slices, more than ${MOST_TILT_DEG}°: fit the stent where it runs across them.`,
  ring: 'The images show no ring of struts here.',
  bound:
    'The search ran into the border of what a stent in a coronary can be: no stent, or none that can be told.',
  sharp:
    'The struts are sharper than the noise of the kernels lets expect, as after smoothing that keeps edges: no fit holds for such images.',
  lumen: 'What fills the ring is no blood, soft tissue or fat: calcium or metal lies here.',
  around:
    'Something beside the stent disturbs it, calcium or a second stent: what is left over lies on one side.',
  structure: 'The fit leaves structure over: the vessel here is not a round stent of even filling.',
  axis: 'The centres of the slices do not lie on a straight line: the vessel bends here.',
  uncertain: 'The noise is too high to tell size and filling apart here.',
} as const;

/** Why no value may be given for a fit; undefined where nothing speaks against it. The first reason that holds is told. */
export function refusalOf({
  found,
  sectors,
  softSdHu,
  softLocalSdHu,
}: Evidence): Refusal | undefined {
  const { axis, centres, round } = found;
  const { parameters, covariance } = round;
  const tilt = tiltDegOf(axis);
  const worst = Math.max(0, ...sectors.map(({ meanHu }) => Math.abs(meanHu)));
  if (
    worst > Math.max(ALWAYS_SECTOR_HU, MOST_SECTOR_SD * softSdHu) ||
    softLocalSdHu > MOST_LOCAL_NOISE * softSdHu
  )
    return { code: 'surroundings', text: text.around };
  const mass = parameters.massHuMm;
  if (!(mass >= LEAST_MASS && mass >= LEAST_RING_ERRORS * errorAt(covariance, 4)))
    return { code: 'no-ring', text: text.ring };
  if (tilt > MOST_TILT_DEG) return { code: 'oblique', text: text.tilt(tilt) };
  if (onBound(parameters)) return { code: 'on-bound', text: text.bound };
  if (parameters.blurSigmaMm < LEAST_BLUR_MM) return { code: 'not-linear', text: text.sharp };
  const { lumenHu } = parameters;
  if (lumenHu < LUMEN_HU[0] || lumenHu > LUMEN_HU[1]) return { code: 'filling', text: text.lumen };
  const off = centres.some(({ zMm, at, errorMm }) => {
    const [u, v] = axisAt(axis, zMm);
    return (
      Math.hypot(at[0] - u, at[1] - v) > Math.max(MOST_OFF_AXIS_MM, MOST_OFF_AXIS_ERRORS * errorMm)
    );
  });
  if (off) return { code: 'bent', text: text.axis };
  if (round.meanSquares > MOST_SQUARES_PER_MEAN * round.lower.length)
    return { code: 'structure', text: text.structure };
  if (2 * errorAt(covariance, 0) > MOST_ERRORS[0] || errorAt(covariance, 3) > MOST_ERRORS[1])
    return { code: 'uncertain', text: text.uncertain };
  return undefined;
}

/** Parameters that a stent is told by; others may lie on their bounds, where the expectations hold them. */
const TOLD: readonly (keyof StentParameters)[] = ['radiusMm', 'lumenHu', 'massHuMm'];

function onBound(parameters: StentParameters): boolean {
  const touches = (name: keyof StentParameters, part: number): boolean => {
    const { low, high } = BOUNDS[name];
    const margin = part * (high - low);
    return parameters[name] <= low + margin || parameters[name] >= high - margin;
  };
  return TOLD.some((name) => touches(name, 0.01)) || touches('blurSigmaMm', 0.0001);
}

/** Standard error of a parameter. */
export function errorAt(covariance: readonly Float64Array[], index: number): number {
  return Math.sqrt(covariance[index]?.[index] ?? Number.POSITIVE_INFINITY);
}
