import {
  DIGITS,
  formatCount,
  formatQuantity,
  formatSigned,
  NO_VALUE,
} from '../../core/format/index.js';
import { isQuiet, type RegionValue, snrBand } from '../../core/region/index.js';

/** A line of the paired readout. */
export interface ReadoutRow {
  readonly name: string;
  readonly soft: string;
  readonly sharp: string;
  /** Sharp minus soft, where a difference means something. */
  readonly delta?: string;
  /** A word that helps to read the line before. */
  readonly aid?: true;
}

type Value = RegionValue | null;

/** The lines of the readout, the reading band of the SNR among them, for a region's values on both kernels; null stands for a stack that has none. */
export function readoutRows(soft: Value, sharp: Value, unit: string): readonly ReadoutRow[] {
  const hu = (value: number | null | undefined) => formatQuantity(value, 'hu');
  const difference = (a: number | null | undefined, b: number | null | undefined) =>
    typeof a === 'number' && typeof b === 'number' ? formatSigned(b - a, DIGITS.hu) : undefined;
  return [
    row(
      `mean ${unit}`,
      hu(soft?.meanHu),
      hu(sharp?.meanHu),
      difference(soft?.meanHu, sharp?.meanHu),
    ),
    row('SD', hu(soft?.sdHu), hu(sharp?.sdHu)),
    row('SNR', formatQuantity(soft?.snr, 'ratio'), formatQuantity(sharp?.snr, 'ratio')),
    { ...row('band', bandText(soft), bandText(sharp)), aid: true },
    row(
      'median',
      hu(soft?.medianHu),
      hu(sharp?.medianHu),
      difference(soft?.medianHu, sharp?.medianHu),
    ),
    row('range', rangeText(soft), rangeText(sharp)),
    row(`pixels · ${areaText(soft, sharp)}`, formatCount(soft?.n), formatCount(sharp?.n)),
  ];
}

function row(name: string, soft: string, sharp: string, delta?: string): ReadoutRow {
  return { name, soft, sharp, ...(delta === undefined ? {} : { delta }) };
}

function bandText(value: Value): string {
  return (typeof value?.snr === 'number' ? snrBand(value.snr) : undefined) ?? NO_VALUE;
}

function rangeText(value: Value): string {
  const least = formatQuantity(value?.minHu, 'pixelHu');
  const most = formatQuantity(value?.maxHu, 'pixelHu');
  return least === NO_VALUE ? NO_VALUE : `${least}…${most}`;
}

function areaText(soft: Value, sharp: Value): string {
  return `${formatQuantity(soft?.areaMm2 ?? sharp?.areaMm2, 'areaMm2')} mm²`;
}

/** The sentences about a region's values, each once; one that holds for one kernel only says which. */
export function flagTexts(soft: Value, sharp: Value): readonly string[] {
  const of = (value: Value) =>
    (value?.flags ?? []).filter((flag) => !isQuiet(flag)).map(({ text }) => text);
  const [a, b] = [of(soft), of(sharp)];
  const both = a.filter((text) => b.includes(text));
  const only = (kernel: string, texts: readonly string[]) =>
    texts.filter((text) => !both.includes(text)).map((text) => `${kernel}: ${text}`);
  return [...new Set(both), ...only('soft', a), ...only('sharp', b)];
}
