import { FREQUENCIES, STEP_PER_MM } from './frequencies.js';

/** Rings of a texture are told this far apart, per mm; the lowest of them have been unfolded, the others are as seen. */
const RING_STEP_PER_MM = 0.08;
const SEEN_FROM_PER_MM = 0.78;
/** Side of the areas in which noise is measured, mm. */
const AREA_MM = 12;

/**
 * What a noise spectrum of these amplitudes, √NPS at {@link FREQUENCIES}, comes out as at the rings of a texture, as
 * √(NPS/f). An area of side L shows each wave as L·sinc²(L·Δf), and a ring takes in its neighbourhood.
 */
export function shownRoots(amplitude: Float64Array, rings: readonly number[]): Float64Array {
  const spread = spreadOf(amplitude.map((one) => one * one));
  return Float64Array.from(rings, (f) => {
    const place = f / STEP_PER_MM - 0.5;
    const below = Math.max(0, Math.min(FREQUENCIES.length - 2, Math.floor(place)));
    if (f < SEEN_FROM_PER_MM) {
      const part = place - below;
      const power =
        (1 - part) * (amplitude[below] as number) ** 2 +
        part * (amplitude[below + 1] as number) ** 2;
      return Math.sqrt(power / f);
    }
    let [sum, weights] = [0, 0];
    for (let index = SPREAD_FROM; index < FREQUENCIES.length; index += 1) {
      const at = FREQUENCIES[index] as number;
      const weight = Math.max(0, 1 - Math.abs(at - f) / RING_STEP_PER_MM) * at;
      sum += weight * (spread[index] as number);
      weights += weight;
    }
    return weights > 0 ? Math.sqrt(sum / weights / f) : 0;
  });
}

let kernel: readonly Float64Array[] | undefined;

/** The first frequency that a ring takes in which is shown as seen. */
const SPREAD_FROM = FREQUENCIES.findIndex((f) => f > SEEN_FROM_PER_MM - RING_STEP_PER_MM);

/** Each frequency's power spread by the size of an area, from the first that is asked for. */
function spreadOf(power: Float64Array): Float64Array {
  kernel ??= spreadMatrix();
  const spread = new Float64Array(power.length);
  // Windows end: nothing is spread from beyond.
  let end = power.length;
  while (end > 0 && power[end - 1] === 0) end -= 1;
  for (let index = SPREAD_FROM; index < spread.length; index += 1) {
    const line = kernel[index] as Float64Array;
    let sum = 0;
    for (let from = 0; from < end; from += 1)
      sum += (line[from] as number) * (power[from] as number);
    spread[index] = sum;
  }
  return spread;
}

function spreadMatrix(): readonly Float64Array[] {
  const seen = (apart: number): number => {
    // Mean of sinc² over a step of the frequencies, so that nothing is lost between them.
    let sum = 0;
    for (let part = 0; part < 5; part += 1) {
      const x = Math.PI * AREA_MM * (apart + ((part - 2) / 5) * STEP_PER_MM);
      sum += Math.abs(x) < 1e-9 ? 1 : (Math.sin(x) / x) ** 2;
    }
    return (AREA_MM * STEP_PER_MM * sum) / 5;
  };
  return Array.from(FREQUENCIES, (f) => FREQUENCIES.map((from) => seen(f - from) + seen(f + from)));
}
