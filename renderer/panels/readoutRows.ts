import {
  DIGITS,
  formatCount,
  formatQuantity,
  formatSigned,
  NO_VALUE,
} from '../../core/format/index.js';
import { FLAGS, isQuiet, type RegionValue, snrBand } from '../../core/region/index.js';

/** A line of the paired readout. */
export interface ReadoutRow {
  readonly name: string;
  readonly soft: string;
  readonly sharp: string;
  /** Sharp minus soft, where a difference means something. */
  readonly delta?: string;
  /** A word that helps to read the line before. */
  readonly aid?: true;
  /** What the number is, in plain words. */
  readonly help?: string;
  /** Code of the flag that says why there is none; any flag may, where there is no code. */
  readonly absentFor?: string;
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
    {
      ...row('standard error', plusMinus(soft?.standardErrorHu), plusMinus(sharp?.standardErrorHu)),
      help: STANDARD_ERROR_HELP,
      absentFor: FLAGS.noStandardError.code,
    },
    {
      ...row('placement', plusMinus(soft?.placementHu), plusMinus(sharp?.placementHu)),
      help: PLACEMENT_HELP,
      absentFor: FLAGS.noPlacement.code,
    },
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

/** What a standard error is, in plain words. */
export const STANDARD_ERROR_HELP =
  'Standard error of the mean: how far noise alone moves it. In 95 of 100 scans like this one the mean would lie within about twice this of what it is without noise. Neighbouring pixels share their noise, which is taken into account.';

/** What a placement sensitivity is, in plain words. */
export const PLACEMENT_HELP =
  'Placement: how far the mean moves, at most, when the region is moved by half a pixel in any of eight directions, or made 0.25 mm larger or smaller at its edge. Large where an edge is near.';

function plusMinus(value: number | null | undefined): string {
  const text = formatQuantity(value, 'hu');
  return text === NO_VALUE ? text : `± ${text}`;
}

/** Why a line has no value on a stack, in sentences. */
export function absenceReason({ absentFor }: ReadoutRow, value: Value): string {
  if (value === null) return 'This stack has no value here.';
  const own = value.flags.filter(({ code }) => code === absentFor);
  const others = value.flags.filter((flag) => !isQuiet(flag));
  return (own.length > 0 ? own : others).map(({ text }) => text).join(' ');
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
