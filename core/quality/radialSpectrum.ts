import type { NoisePower } from './noisePower.js';

/** Sums of a spectrum over rings of equal frequency; rings k·stepPerMm, k = 0 … length − 1. */
export interface RingSums {
  readonly stepPerMm: number;
  readonly power: Float64Array;
  readonly weight: Float64Array;
}

/** A spectrum over the distance from frequency 0. */
export interface RadialSpectrum {
  readonly frequencyPerMm: Float64Array;
  /** HU²mm². */
  readonly powerHu2Mm2: Float64Array;
}

/**
 * Sums of a two-dimensional spectrum over rings. Each place of the lattice is shared between the two rings that it
 * lies between, so that spectra of different lattices meet on one axis.
 *
 * `foldAtPerMm` is the highest frequency along x and y that a coarser grid can carry: power beyond it is counted
 * where sampling on that grid would fold it to. So a fine stack is seen as the coarse one would show it.
 */
export function ringSums(
  spectrum: NoisePower,
  stepPerMm: number,
  rings: number,
  foldAtPerMm: readonly [number, number] = [Infinity, Infinity],
): RingSums {
  const power = new Float64Array(rings);
  const weight = new Float64Array(rings);
  const us = lattice(spectrum.columns, spectrum.stepPerMm[0], foldAtPerMm[0]);
  const vs = lattice(spectrum.rows, spectrum.stepPerMm[1], foldAtPerMm[1]);
  for (let row = 0; row < spectrum.rows; row += 1) {
    const v = vs.at[row] ?? 0;
    for (let column = 0; column < spectrum.columns; column += 1) {
      const u = us.at[column] ?? 0;
      const ring = Math.sqrt(u * u + v * v) / stepPerMm;
      const below = Math.floor(ring);
      if (below >= rings) continue;
      const value = spectrum.values[row * spectrum.columns + column] ?? 0;
      // A folded place adds its power to one that is counted already.
      const counted = (us.own[column] ?? 0) * (vs.own[row] ?? 0);
      const upper = ring - below;
      power[below] = (power[below] ?? 0) + (1 - upper) * value;
      weight[below] = (weight[below] ?? 0) + (1 - upper) * counted;
      if (below + 1 < rings) {
        power[below + 1] = (power[below + 1] ?? 0) + upper * value;
        weight[below + 1] = (weight[below + 1] ?? 0) + upper * counted;
      }
    }
  }
  return { stepPerMm, power, weight };
}

/** Frequencies of one side of the lattice, folded, and whether each lies inside the band by itself. */
function lattice(
  count: number,
  step: number,
  fold: number,
): { readonly at: Float64Array; readonly own: Uint8Array } {
  const at = new Float64Array(count);
  const own = new Uint8Array(count);
  for (let index = 0; index < count; index += 1) {
    const frequency = (index <= count / 2 ? index : index - count) * step;
    const inside = Math.abs(frequency) <= fold * (1 + 1e-9);
    own[index] = inside ? 1 : 0;
    at[index] = inside ? frequency : frequency - 2 * fold * Math.round(frequency / (2 * fold));
  }
  return { at, own };
}

/** Ring sums of several areas added up, without the area `leftOut` where one is named. */
export function addRings(all: readonly RingSums[], leftOut = -1): RingSums {
  const [first] = all;
  if (first === undefined) throw new RangeError('no ring sums to add');
  const power = new Float64Array(first.power.length);
  const weight = new Float64Array(first.power.length);
  all.forEach((one, index) => {
    if (index === leftOut) return;
    for (let ring = 0; ring < power.length; ring += 1) {
      power[ring] = (power[ring] ?? 0) + (one.power[ring] ?? 0);
      weight[ring] = (weight[ring] ?? 0) + (one.weight[ring] ?? 0);
    }
  });
  return { stepPerMm: first.stepPerMm, power, weight };
}

/** The radial average of a spectrum. Frequency 0 is left out: detrending has emptied it. Rings without a place too. */
export function radialSpectrum({ stepPerMm, power, weight }: RingSums): RadialSpectrum {
  const frequencies: number[] = [];
  const powers: number[] = [];
  for (let ring = 1; ring < power.length; ring += 1) {
    const places = weight[ring] ?? 0;
    if (places < 1e-6) continue;
    frequencies.push(ring * stepPerMm);
    powers.push((power[ring] ?? 0) / places);
  }
  return {
    frequencyPerMm: Float64Array.from(frequencies),
    powerHu2Mm2: Float64Array.from(powers),
  };
}

/**
 * Mean frequency of a radial spectrum, per mm, in its one-dimensional form f_av = ∫f·NPS(f)df / ∫NPS(f)df
 * (AAPM report 233, 2019): the rings are not weighted with their length. Undefined for a spectrum without power.
 */
export function meanFrequency({ frequencyPerMm, powerHu2Mm2 }: RadialSpectrum): number | undefined {
  let sum = 0;
  let moment = 0;
  frequencyPerMm.forEach((frequency, index) => {
    const power = powerHu2Mm2[index] ?? 0;
    sum += power;
    moment += frequency * power;
  });
  return sum > 0 ? moment / sum : undefined;
}

/** Frequency of the ring with the most power, per mm: no finer than the rings are. Undefined without power. */
export function peakFrequency({ frequencyPerMm, powerHu2Mm2 }: RadialSpectrum): number | undefined {
  let best: number | undefined;
  let most = 0;
  powerHu2Mm2.forEach((power, index) => {
    if (power > most) {
      most = power;
      best = frequencyPerMm[index];
    }
  });
  return best;
}
