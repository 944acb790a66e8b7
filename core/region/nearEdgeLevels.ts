import type { Vec3 } from '../geometry/index.js';
import { type KernelTexture, localNoiseShare } from '../quality/index.js';
import { gaussianTaps } from './nearEdgeWindow.js';

/** What tells a strong edge from lumen, tissue and noise on one kernel, HU, and over which lengths it is looked for. */
export interface EdgeLevels {
  /** Full width at half maximum of the kernel's blur. */
  readonly blurMm: number;
  /** Standard deviation of the Gaussian that the image is smoothed with before. */
  readonly smoothingMm: number;
  /** Enhanced lumen: the brightest even tissue near the place. */
  readonly lumenHu: number;
  /** A bright structure is what lies above this without a gap… */
  readonly brightHu: number;
  /** …and reaches this somewhere, or is longer than {@link longMm}. */
  readonly peakHu: number;
  readonly longMm: number;
}

/** The image is smoothed with a quarter of the blur: edges widen by a sixth, √(1 + (0.25·2.355)²). */
const SMOOTHING_PER_BLUR = 0.25;
/** A narrower Gaussian than this falls between the pixels and smooths nothing. */
const LEAST_SMOOTHING_PIXELS = 0.6;
/** Enhanced lumen differs by this share from vessel to vessel. Common practice, no source. */
const LUMEN_SPREAD = 0.12;
/**
 * Normal noise lies above the first in 29 of 1,000 places, as specks, and above the second in one of 100,000. Chosen on
 * phantoms (`npm run evidence`): lower ones flag noise, higher ones lose weak struts.
 */
const BRIGHT_SDS = 1.9;
const PEAK_SDS = 4.3;
/** What is longer than so many blurs is no grain of noise. */
const LONG_BLURS = 4.5;
/** Even areas farther away than this tell of another vessel or of bone, mm. */
const NEAR_MM = 60;

/**
 * Levels for a place, from the even areas of the pair; undefined where the blur was not measured, or where the even
 * areas do not tell their means (notes of earlier versions).
 */
export function edgeLevels(
  texture: KernelTexture,
  placeMm: Vec3,
  spacingMm: readonly [number, number],
): EdgeLevels | undefined {
  const { blurFwhmMm } = texture;
  const lumenHu = brightestNear(texture, placeMm);
  if (blurFwhmMm === null || lumenHu === undefined) return undefined;
  const smoothingMm = Math.max(
    SMOOTHING_PER_BLUR * blurFwhmMm,
    LEAST_SMOOTHING_PIXELS * Math.min(...spacingMm),
  );
  const noiseHu =
    texture.noiseSdHu *
    localNoiseShare(texture, placeMm) *
    noiseLeft(texture, smoothingMm, spacingMm);
  const spreadHu = LUMEN_SPREAD * Math.max(0, lumenHu);
  return {
    blurMm: blurFwhmMm,
    smoothingMm,
    lumenHu,
    brightHu: lumenHu + Math.hypot(spreadHu, BRIGHT_SDS * noiseHu),
    peakHu: lumenHu + Math.hypot(spreadHu, PEAK_SDS * noiseHu),
    longMm: LONG_BLURS * blurFwhmMm,
  };
}

/** Mean of the brightest even area near a place; of all, where none is near. */
function brightestNear({ places = [] }: KernelTexture, placeMm: Vec3): number | undefined {
  let [near, any] = [-Infinity, -Infinity];
  for (const { centreMm: at, meanHu } of places) {
    if (meanHu === undefined) continue;
    any = Math.max(any, meanHu);
    const squared =
      (at[0] - placeMm[0]) ** 2 + (at[1] - placeMm[1]) ** 2 + (at[2] - placeMm[2]) ** 2;
    if (squared <= NEAR_MM * NEAR_MM) near = Math.max(near, meanHu);
  }
  if (any === -Infinity) return undefined;
  return near === -Infinity ? any : near;
}

/** Directions in a quarter turn over which the smoothing is averaged. */
const DIRECTIONS = 4;

/**
 * Share of the noise SD that the smoothing leaves: √(∫P·H² f df / ∫P f df) from the measured spectrum, H the transfer
 * function of the very taps along rows and columns.
 */
function noiseLeft(
  { frequencyPerMm, powerHu2Mm2 }: KernelTexture,
  smoothingMm: number,
  [acrossMm, downMm]: readonly [number, number],
): number {
  const [across, down] = [gaussianTaps(smoothingMm / acrossMm), gaussianTaps(smoothingMm / downMm)];
  let [left, all] = [0, 0];
  for (let ring = 0; ring < frequencyPerMm.length; ring++) {
    const frequency = frequencyPerMm[ring] as number;
    const power = (powerHu2Mm2[ring] ?? 0) * frequency;
    for (let direction = 0; direction < DIRECTIONS; direction++) {
      const angle = ((direction + 0.5) * Math.PI) / (2 * DIRECTIONS);
      const passed =
        transfer(across, acrossMm * frequency * Math.cos(angle)) *
        transfer(down, downMm * frequency * Math.sin(angle));
      all += power;
      left += power * passed * passed;
    }
  }
  return all > 0 ? Math.sqrt(left / all) : 1;
}

/** Transfer function of symmetrical taps at a frequency in cycles per pixel. */
function transfer(taps: Float64Array, perPixel: number): number {
  let sum = taps[0] as number;
  for (let n = 1; n < taps.length; n++)
    sum += 2 * (taps[n] as number) * Math.cos(2 * Math.PI * n * perPixel);
  return sum;
}
