import { type Result, refuse, success } from '../result.js';
import { type DiscTexture, detectabilityPerHu } from './detectability.js';

/** Diameters that are asked about, mm. */
export const LEAST_DIAMETER_MM = 0.2;
export const MOST_DIAMETER_MM = 12;
/** Diameters are looked at this much apart first: noise that is measured may make d′ rise unevenly. */
const RATIO = 1.05;
/** A diameter is found to a thousandth. */
const TOLERANCE = 1e-3;

/**
 * Contrast from which a disc of this diameter is seen, HU: k / d′ of 1 HU. Rose's criterion: what stands out k times
 * its noise is seen, k of 3 to 5 (Rose 1948, doi 10.1364/JOSA.38.000196; 5 is the classic value).
 */
export function visibleContrast(
  texture: DiscTexture,
  diameterMm: number,
  k: number,
): Result<number> {
  const unit = detectabilityPerHu(texture, diameterMm);
  return unit.ok ? success(k / unit.value) : unit;
}

/**
 * The smallest disc that is seen at a contrast, by Rose's criterion d′ ≥ k: its diameter in mm. Refused where the
 * texture gives no detectability, where no disc up to 12 mm is seen (the uniform areas are no larger, so that the
 * noise of larger ones is not known) and where one of 0.2 mm already is.
 */
export function visibleDisc(texture: DiscTexture, contrastHu: number, k: number): Result<number> {
  const wanted = k / Math.abs(contrastHu);
  let below: number | undefined;
  for (let mm = LEAST_DIAMETER_MM; ; mm = Math.min(mm * RATIO, MOST_DIAMETER_MM)) {
    const unit = detectabilityPerHu(texture, mm);
    if (!unit.ok) return unit;
    if (unit.value >= wanted)
      return below === undefined
        ? refuse('all-seen', `Even a disc of ${LEAST_DIAMETER_MM} mm is seen.`)
        : narrowed(texture, wanted, below, mm);
    if (mm >= MOST_DIAMETER_MM)
      return refuse('none-seen', `No disc of up to ${MOST_DIAMETER_MM} mm is seen.`);
    below = mm;
  }
}

/** Halves the way between a diameter that is not seen and one that is. */
function narrowed(
  texture: DiscTexture,
  wanted: number,
  unseenMm: number,
  seenMm: number,
): Result<number> {
  let [low, high] = [unseenMm, seenMm];
  while (high - low > TOLERANCE * high) {
    const middle = (low + high) / 2;
    const unit = detectabilityPerHu(texture, middle);
    if (!unit.ok) return unit;
    if (unit.value >= wanted) high = middle;
    else low = middle;
  }
  return success((low + high) / 2);
}
