import { line, max, type ScaleLinear, type ScaleLogarithmic, scaleLinear, scaleLog } from 'd3';
import { formatFixed } from '../../core/format/index.js';
import type { NoiseSpectrum } from '../pairing/measuredPair.js';

/** What the picture of two noise power spectra is made of, in CSS px. */
export interface NoiseDrawing {
  readonly x: ScaleLinear<number, number>;
  readonly y: ScaleLinear<number, number> | ScaleLogarithmic<number, number>;
  readonly isLog: boolean;
  /** Powers that get a line and a number, HU² mm². */
  readonly powers: readonly number[];
  readonly softLine: string;
  readonly sharpLine: string;
}

export const NOISE_MARGIN_PX = { top: 24, right: 10, bottom: 32, left: 42 } as const;

/** When one spectrum's peak is this many times the other's, the lower one would lie on the axis of a linear scale. */
const LOG_FROM_RATIO = 4;
/** A logarithmic axis goes down this far below the highest power; what is lower lies on the axis. */
const DECADES = 3;

/**
 * Scales and lines for both spectra over frequency. Power is on a logarithmic axis when the two differ much, so that
 * both shapes can be seen, else on a linear one from zero. The value at frequency 0 is left out: removing the trend of
 * each area has taken it away.
 */
export function noiseDrawing(
  soft: NoiseSpectrum,
  sharp: NoiseSpectrum,
  widthPx: number,
  heightPx: number,
): NoiseDrawing {
  const [a, b] = [pointsOf(soft), pointsOf(sharp)];
  const peaks = [a, b].map((points) => max(points, ({ power }) => power) ?? 0);
  const highest = Math.max(...peaks);
  const isLog = Math.min(...peaks) > 0 && highest / Math.min(...peaks) >= LOG_FROM_RATIO;
  const last = max([...a, ...b], ({ perMm }) => perMm) ?? 1;
  const x = scaleLinear([0, last], [NOISE_MARGIN_PX.left, widthPx - NOISE_MARGIN_PX.right]);
  const range = [heightPx - NOISE_MARGIN_PX.bottom, NOISE_MARGIN_PX.top];
  const top = 10 ** Math.ceil(Math.log10(Math.max(highest, 1e-6)) - 1e-9);
  const floor = top / 10 ** DECADES;
  const y = isLog ? scaleLog([floor, top], range) : scaleLinear([0, highest || 1], range).nice(4);
  const curve = line<Point>()
    .x(({ perMm }) => x(perMm))
    .y(({ power }) => y(isLog ? Math.max(power, floor) : power));
  const powers = isLog
    ? Array.from({ length: DECADES + 1 }, (_, decade) => floor * 10 ** decade)
    : y.ticks(Math.max(2, Math.min(4, Math.floor((heightPx - 56) / 22))));
  return { x, y, isLog, powers, softLine: curve(a) ?? '', sharpLine: curve(b) ?? '' };
}

interface Point {
  readonly perMm: number;
  readonly power: number;
}

function pointsOf({ frequencyPerMm, powerHu2Mm2 }: NoiseSpectrum): readonly Point[] {
  return Array.from(frequencyPerMm).flatMap((perMm, index) => {
    const power = powerHu2Mm2[index];
    return perMm > 0 && power !== undefined && Number.isFinite(power) ? [{ perMm, power }] : [];
  });
}

/** Both spectra in words, for those who do not see them. */
export function noiseSummary(soft: NoiseSpectrum, sharp: NoiseSpectrum): string {
  const words = (name: string, spectrum: NoiseSpectrum): string => {
    const points = pointsOf(spectrum);
    const peak = points.reduce<Point | undefined>(
      (best, point) => (best === undefined || point.power > best.power ? point : best),
      undefined,
    );
    if (peak === undefined) return `${name}: no spectrum.`;
    const mean = `, mean frequency ${formatFixed(spectrum.meanPerMm, 2)} per mm`;
    return `${name}: highest ${powerText(peak.power)} HU² mm² at ${formatFixed(peak.perMm, 2)} per mm${mean}.`;
  };
  return `Noise power spectra. ${words('Soft', soft)} ${words('Sharp', sharp)}`;
}

/** A power with as many digits as it needs. */
export function powerText(power: number): string {
  return formatFixed(power, power >= 10 || power === 0 ? 0 : power >= 1 ? 1 : power >= 0.1 ? 2 : 3);
}
