import type { Vec3 } from '../geometry/index.js';
import { type KernelTexture, localNoiseShare } from '../quality/index.js';

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

/** The image is smoothed with a quarter of the blur: noise falls by a third and more, edges are hardly widened. */
const SMOOTHING_PER_BLUR = 0.25;
/** Enhanced lumen differs by this share from vessel to vessel. Common practice, no source. */
const LUMEN_SPREAD = 0.1;
/** Noise alone goes so many SDs above the lumen in one of some 10,000 looks at a window, and so many anywhere. */
const BRIGHT_SDS = 2.2;
const PEAK_SDS = 4.6;
/** What is longer than so many blurs is no grain of noise. */
const LONG_BLURS = 4.5;
/** Even areas farther away than this tell of another vessel or of bone, mm. */
const NEAR_MM = 60;

/**
 * Levels for a place, from the even areas of the pair; undefined where the blur was not measured, or where the even
 * areas do not tell their means (notes of earlier versions).
 */
export function edgeLevels(texture: KernelTexture, placeMm: Vec3): EdgeLevels | undefined {
  const { blurFwhmMm } = texture;
  const lumenHu = brightestNear(texture, placeMm);
  if (blurFwhmMm === null || lumenHu === undefined) return undefined;
  const smoothingMm = SMOOTHING_PER_BLUR * blurFwhmMm;
  const noiseHu =
    texture.noiseSdHu * localNoiseShare(texture, placeMm) * noiseLeft(texture, smoothingMm);
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

/**
 * Share of the noise SD that a Gaussian smoothing leaves: √(∫P·H² f df / ∫P f df), H = exp(−2π²s²f²) its transfer
 * function, from the measured spectrum.
 */
function noiseLeft({ frequencyPerMm, powerHu2Mm2 }: KernelTexture, smoothingMm: number): number {
  let [left, all] = [0, 0];
  frequencyPerMm.forEach((frequency, ring) => {
    const power = (powerHu2Mm2[ring] ?? 0) * frequency;
    all += power;
    left += power * Math.exp(-4 * (Math.PI * smoothingMm * frequency) ** 2);
  });
  return all > 0 ? Math.sqrt(left / all) : 1;
}
