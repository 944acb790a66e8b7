import type { RingResponse } from './textureOfResponse.js';

/** Ring powers that areas of one size have shown, and how such areas show noise. */
export interface ShownRings extends RingResponse {
  /** HU²mm², mean over the places of each ring. */
  readonly power: Float64Array;
  /** Number of areas. */
  readonly areas: number;
}

/**
 * Turns of the iteration. The lowest ring of a filtered back projection comes out 10 to 30 % high after
 * that many, that of noise which is flat there right; hundreds of turns would only follow the chance in the rings.
 */
const TURNS = 30;

/**
 * The noise power that is there, from what areas of one or more sizes show of it: the turn-by-turn scaling of
 * Richardson 1972 (doi 10.1364/JOSA.62.000055) and Lucy 1974 (doi 10.1086/111605), which keeps power positive and
 * leaves what the areas can't tell near the start. It starts from the shown power over what of white noise is shown.
 * Ring 0 is not seen at all and goes with ring 1; rings that an area shows as they are stay as they are.
 */
export function unfoldedPower(shown: readonly ShownRings[]): Float64Array {
  const power = pooled(shown);
  const low = shown[0]?.weight.length ?? 0;
  for (let ring = 1; ring < low; ring += 1) power[ring] = asOfWhite(shown, ring);
  power[0] = power[1] ?? 0;
  for (let turn = 0; turn < TURNS; turn += 1) {
    const gain = new Float64Array(low);
    const total = new Float64Array(low);
    for (const one of shown) addGains(one, power, gain, total);
    for (let ring = 0; ring < low; ring += 1) {
      const sum = total[ring] as number;
      if (sum > 0) power[ring] = ((power[ring] as number) * (gain[ring] as number)) / sum;
    }
  }
  return power;
}

/** Mean of the areas, each counting alike. */
function pooled(shown: readonly ShownRings[]): Float64Array {
  const power = new Float64Array(shown[0]?.power.length ?? 0);
  const areas = shown.reduce((sum, one) => sum + one.areas, 0);
  for (const one of shown)
    for (let ring = 0; ring < power.length; ring += 1)
      power[ring] =
        (power[ring] as number) + ((one.power[ring] as number) * one.areas) / Math.max(1, areas);
  return power;
}

/** A ring's power if it were that of white noise. */
function asOfWhite(shown: readonly ShownRings[], ring: number): number {
  let [seen, white] = [0, 0];
  for (const { areas, weight, power, response } of shown) {
    const places = areas * (weight[ring] as number);
    seen += places * (power[ring] as number);
    white += places * (response[ring] as Float64Array).reduce((sum, part) => sum + part, 0);
  }
  return white > 0 ? seen / white : 0;
}

/** Each true ring is scaled by how much more was shown than expected in the rings where it appears. */
function addGains(
  { response, weight, power: seen, areas }: ShownRings,
  power: Float64Array,
  gain: Float64Array,
  total: Float64Array,
): void {
  for (let ring = 1; ring < gain.length; ring += 1) {
    const row = response[ring] as Float64Array;
    const places = areas * (weight[ring] as number);
    const expected = row.reduce((sum, part, index) => sum + part * (power[index] as number), 0);
    if (!(expected > 0) || places < 1e-6) continue;
    const ratio = (seen[ring] as number) / expected;
    for (let index = 0; index < gain.length; index += 1) {
      const part = places * (row[index] as number);
      gain[index] = (gain[index] as number) + part * ratio;
      total[index] = (total[index] as number) + part;
    }
  }
}
