import { normalSource, type UniformSource } from '../phantom/index.js';
import type { Uncertainty } from './annuliCovariance.js';
import { fitOnce } from './roundFit.js';
import { EXPECTATIONS, roundMeans } from './roundProblem.js';
import type { FoundStent } from './searchStent.js';
import { listOf, type StentParameters } from './stentModel.js';

/** Standard errors by refitting. */
export interface Refitted {
  readonly strutDiameterMm: number;
  readonly lumenHu: number;
  readonly refits: number;
}

/**
 * Fits again to what the fitted model shows, each time with other noise, drawn from the covariance of the means: their
 * scatter is a standard error that knows how bent the model is. The place of the axis is held.
 *
 * @returns undefined where fewer than half come to an end
 */
export function refitWithNoise(
  { round, annuli }: FoundStent,
  uncertainty: Uncertainty,
  uniform: UniformSource,
  refits: number,
): Refitted | undefined {
  const normal = normalSource(uniform);
  const value = roundMeans(annuli, uncertainty.apodisation, round.parameters);
  const diameters: number[] = [];
  const lumens: number[] = [];
  for (let refit = 0; refit < refits; refit += 1) {
    const draws = Float64Array.from(value, () => normal());
    const noisy = value.map((mean, row) => {
      const line = round.lower[row] as Float64Array;
      let sum = mean;
      for (let k = 0; k <= row; k += 1) sum += (line[k] as number) * (draws[k] as number);
      return sum;
    });
    const again = fitOnce(
      annuli,
      uncertainty,
      round.parameters,
      {},
      {
        measured: noisy,
        lower: round.lower,
        expectedOff: expectationsAround(round.parameters, normal),
      },
    );
    if (again === undefined) continue;
    diameters.push(2 * again.parameters.radiusMm);
    lumens.push(again.parameters.lumenHu);
  }
  if (diameters.length < refits / 2 || diameters.length < 2) return undefined;
  return {
    strutDiameterMm: spreadOf(diameters),
    lumenHu: spreadOf(lumens),
    refits: diameters.length,
  };
}

/** The expectations as if the fitted stent were the true one and they were off by chance. */
function expectationsAround(parameters: StentParameters, normal: () => number): Float64Array {
  const list = listOf(parameters);
  return Float64Array.from(
    EXPECTATIONS,
    ({ k, mean, sd }) => ((list[k] as number) - mean) / sd + normal(),
  );
}

function spreadOf(values: readonly number[]): number {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  return Math.sqrt(
    values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (values.length - 1),
  );
}
