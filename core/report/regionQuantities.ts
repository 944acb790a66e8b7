import { type RegionValue, SNR_FORMULA } from '../region/index.js';
import { type Digits, printedDigits, type QuantityValue } from './quantityDefinition.js';

interface Definition {
  readonly quantity: string;
  readonly key: keyof RegionValue;
  readonly digits: Digits;
  readonly unit: 'pixel' | 'mm²' | '' | 'px';
  readonly formula: string;
  /** Left out of a table when there is none: not every version measures it. */
  readonly optional?: true;
}

const DEFINITIONS = [
  { quantity: 'mean', key: 'meanHu', digits: 'hu', unit: 'pixel', formula: 'sum / n' },
  {
    quantity: 'SD',
    key: 'sdHu',
    digits: 'hu',
    unit: 'pixel',
    formula: 'sample SD, divisor n - 1',
  },
  { quantity: 'median', key: 'medianHu', digits: 'hu', unit: 'pixel', formula: 'median' },
  { quantity: 'minimum', key: 'minHu', digits: 'pixelHu', unit: 'pixel', formula: 'minimum' },
  { quantity: 'maximum', key: 'maxHu', digits: 'pixelHu', unit: 'pixel', formula: 'maximum' },
  {
    quantity: 'n',
    key: 'n',
    digits: 'count',
    unit: 'px',
    formula: 'pixels with their centre inside, edge included',
  },
  {
    quantity: 'area',
    key: 'areaMm2',
    digits: 'areaMm2',
    unit: 'mm²',
    formula: 'area of the shape',
  },
  {
    quantity: 'sampled area',
    key: 'sampledAreaMm2',
    digits: 'areaMm2',
    unit: 'mm²',
    formula: 'n times the area of a pixel',
  },
  { quantity: 'SNR', key: 'snr', digits: 'ratio', unit: '', formula: SNR_FORMULA },
  {
    quantity: 'standard error',
    key: 'standardErrorHu',
    digits: 'hu',
    unit: 'pixel',
    formula: 'of the mean, by noise alone, from its autocorrelation on this kernel',
    optional: true,
  },
  {
    quantity: 'placement',
    key: 'placementHu',
    digits: 'hu',
    unit: 'pixel',
    formula:
      'largest change of the mean when moved by half a pixel in eight directions or made 0.25 mm larger or smaller at its edge',
    optional: true,
  },
] as const satisfies readonly Definition[];

/** The quantities of a region in the order of the tables; `unit` is that of the stack's pixels. */
export function regionQuantities(value: RegionValue, unit: string): readonly QuantityValue[] {
  const definitions: readonly Definition[] = DEFINITIONS;
  return definitions.flatMap(({ quantity, key, digits, unit: kind, formula, optional }) => {
    const number = value[key];
    const known = typeof number === 'number' ? number : null;
    if (optional && known === null) return [];
    return [
      {
        quantity,
        value: known,
        printed: printedDigits(known, digits),
        unit: kind === 'pixel' ? unit : kind,
        formula,
      },
    ];
  });
}

/** How each quantity of a region is printed. */
export const REGION_DIGITS: readonly (readonly [quantity: string, digits: Digits])[] =
  DEFINITIONS.map(({ quantity, digits }) => [quantity, digits]);
