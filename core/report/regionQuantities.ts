import { formatFixed, formatQuantity, type Quantity } from '../format/index.js';
import { type RegionValue, SNR_FORMULA } from '../region/index.js';

/** One number of a region, with all that it needs to be read: digits for people, unit, formula. */
export interface QuantityValue {
  readonly quantity: string;
  readonly value: number | null;
  /** For people, with a real minus sign; an en dash for no value. */
  readonly printed: string;
  readonly unit: string;
  readonly formula: string;
}

interface Definition {
  readonly quantity: string;
  readonly key: keyof RegionValue;
  readonly digits: Quantity | 'count';
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

/** A number as the tables print a quantity of a region, or a CNR. */
export function printedAs(quantity: string, value: number): string {
  const definitions: readonly Definition[] = DEFINITIONS;
  const definition = definitions.find((one) => one.quantity === quantity);
  return printedDigits(value, definition?.digits ?? 'ratio');
}

function printedDigits(value: number | null, digits: Definition['digits']): string {
  return digits === 'count' ? formatFixed(value, 0) : formatQuantity(value, digits);
}
