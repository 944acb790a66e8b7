import { formatFixed } from '../format/index.js';
import type { Kernel } from '../note/schema.js';
import type { StentValue } from '../note/stentSchema.js';
import type { Digits, QuantityDefinition } from './quantityDefinition.js';

type EstimateName =
  | 'strutDiameterMm'
  | 'lumenHu'
  | 'wallWidthMm'
  | 'wallHu'
  | 'strutMassHuMm'
  | 'blurSigmaMm';

const OF_FIT = 'of the fit, from the noise of both kernels';
const BY_REFITS = 'scatter of refits to simulated noise';

/** What a fit gives for both kernels at once, in the order of the tables. */
export const STENT_DEFINITIONS: readonly QuantityDefinition<StentValue>[] = [
  ...estimate('strut diameter', 'strutDiameterMm', 'lengthMm', 'mm', {
    formula:
      'of the circle in the middle of the struts (inner diameter plus one strut thickness), fitted on both kernels at once',
  }),
  ...refitted('strut diameter', 'strutDiameterMm', 'lengthMm', 'mm'),
  ...estimate('fitted lumen', 'lumenHu', 'fittedHu', 'HU', {
    formula: 'density of the lumen inside the struts, fitted on both kernels at once',
  }),
  ...refitted('fitted lumen', 'lumenHu', 'fittedHu', 'HU'),
  ...estimate('wall width', 'wallWidthMm', 'lengthMm', 'mm', {
    formula: 'from the circle in the middle of the struts to the outer border of the wall, fitted',
  }),
  ...estimate('fitted wall', 'wallHu', 'fittedHu', 'HU', {
    formula: 'density of the wall, fitted',
  }),
  ...estimate('strut line mass', 'strutMassHuMm', 'massHuMm', 'HU·mm', {
    formula: 'what the ring of struts adds, per length of its circle, fitted',
  }),
  ...estimate('shared blur', 'blurSigmaMm', 'lengthMm', 'mm', {
    formula: 'standard deviation of the Gaussian blur that both kernels share, fitted',
  }),
  {
    quantity: 'chi square',
    value: ({ goodness }) => goodness?.chiSquare ?? null,
    digits: 'ratio',
    unit: '',
    formula: 'sum of squares of what the fit leaves over, in standard errors',
  },
  {
    quantity: 'degrees of freedom',
    value: ({ goodness }) => goodness?.degreesOfFreedom ?? null,
    digits: 'count',
    unit: '',
    formula: 'data of the fit less its parameters',
  },
  {
    quantity: 'tilt',
    value: ({ tiltDeg }) => tiltDeg,
    digits: 'angleDeg',
    unit: '°',
    formula: 'angle between the axis of the vessel and the normal of the plane that was fitted on',
  },
  {
    quantity: 'fitted slices',
    value: ({ slices }) => slices,
    digits: 'count',
    unit: 'slices',
    formula: 'slices of each kernel that were fitted',
  },
];

/** What stands beside a fit on one kernel. */
export interface BesideFit {
  readonly fit: StentValue;
  readonly kernel: Kernel;
}

/** What a plain region reads where a stent was fitted, and the noise there, on one kernel. */
export const KERNEL_DEFINITIONS: readonly QuantityDefinition<BesideFit>[] = [
  {
    quantity: 'plain region',
    value: ({ fit: { plain }, kernel }) =>
      plain?.[kernel === 'soft' ? 'softHu' : 'sharpHu'] ?? null,
    digits: 'fittedHu',
    unit: 'HU',
    formula: 'mean of a round region about the axis, inside the struts: they bloom into it',
  },
  {
    quantity: 'plain region radius',
    value: ({ fit }) => fit.plain?.radiusMm ?? null,
    digits: 'lengthMm',
    unit: 'mm',
    formula: 'radius of that region',
  },
  {
    quantity: 'noise around the stent',
    value: ({ fit, kernel }) => fit.images.find((of) => of.kernel === kernel)?.noiseSdHu ?? null,
    digits: 'hu',
    unit: 'HU',
    formula: 'SD of the noise on this kernel, near the stent',
    optional: true,
  },
];

/** An estimate and its standard error; both are null where there was no fit. */
function estimate(
  quantity: string,
  name: EstimateName,
  digits: Digits,
  unit: string,
  { formula }: { readonly formula: string },
): readonly QuantityDefinition<StentValue>[] {
  return [
    { quantity, value: (fit) => fit[name]?.value ?? null, digits, unit, formula },
    {
      quantity: `${quantity} standard error`,
      value: (fit) => fit[name]?.se ?? null,
      digits,
      unit,
      formula: OF_FIT,
    },
  ];
}

function refitted(
  quantity: string,
  name: 'strutDiameterMm' | 'lumenHu',
  digits: Digits,
  unit: string,
): readonly QuantityDefinition<StentValue>[] {
  return [
    {
      quantity: `${quantity} standard error by refits`,
      value: ({ refitted: again }) => again?.[name] ?? null,
      digits,
      unit,
      formula: BY_REFITS,
      optional: true,
    },
  ];
}

/** How many refits the second standard errors rest on, in words; empty without refits. */
export function refitsText({ refitted: again }: Pick<StentValue, 'refitted'>): string {
  return again === null ? '' : `Standard errors by refits: ${formatFixed(again.refits, 0)} refits.`;
}
