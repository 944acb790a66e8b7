import type { Annuli } from './annuli.js';
import type { Apodisation } from './apodisation.js';
import { FREQUENCIES } from './frequencies.js';
import type { Linearised } from './levenbergMarquardt.js';
import { forwardSolve } from './linear.js';
import { PARAMETERS, parametersOf, type StentParameters, stentSpectrum } from './stentModel.js';

/** What is usual of a vessel and a scanner, mean and SD: common practice, no source. It holds where the images tell nothing. */
const EXPECTED: Partial<Record<keyof StentParameters, readonly [number, number]>> = {
  wallWidthMm: [0.5, 0.4],
  blurSigmaMm: [0.25, 0.15],
  wallHu: [50, 40],
  levelHu: [0, 5],
};

/** The expectations as parameter, mean and SD, in the order in which they follow the means. */
export const EXPECTATIONS = PARAMETERS.flatMap((name, k) => {
  const [mean, sd] = EXPECTED[name] ?? [0, 0];
  return sd > 0 ? [{ k, mean, sd }] : [];
});

const FAT = PARAMETERS.indexOf('fatHu');
const LEVEL = PARAMETERS.indexOf('levelHu');

/**
 * The least-squares problem of the annular means: residuals (model − measured) of unit variance, whitened with the
 * means' covariance once for all steps, then those of the expectations.
 */
export function roundProblem(
  annuli: readonly Annuli[],
  apodisation: Apodisation,
  lower: readonly Float64Array[],
  measured: Float64Array,
  expectedOff: ArrayLike<number> = new Float64Array(EXPECTATIONS.length),
): (point: Float64Array) => Linearised {
  const means = measured.length;
  const size = means + EXPECTATIONS.length;
  const waves = whitenedWaves(annuli, apodisation, lower);
  const data = forwardSolve(lower, measured);
  const even = forwardSolve(lower, new Float64Array(means).fill(1));
  const ofFirst = forwardSolve(lower, firstKernel(annuli));
  const through = (spectrum: Float64Array): Float64Array => {
    const values = new Float64Array(size);
    for (let row = 0; row < means; row += 1) {
      const wave = waves[row] as Float64Array;
      let sum = 0;
      for (let f = 0; f < wave.length; f += 1) sum += (wave[f] as number) * (spectrum[f] as number);
      values[row] = sum;
    }
    return values;
  };
  return (point) => {
    const parameters = parametersOf(point);
    const spectrum = stentSpectrum(parameters);
    const residuals = through(spectrum.value);
    for (let row = 0; row < means; row += 1)
      residuals[row] =
        (residuals[row] as number) +
        parameters.fatHu * (even[row] as number) +
        parameters.levelHu * (ofFirst[row] as number) -
        (data[row] as number);
    const slopes = spectrum.slopes.map((slope, k) => {
      const values = k === LEVEL ? new Float64Array(size) : through(slope);
      if (k === LEVEL) values.set(ofFirst);
      if (k === FAT)
        for (let row = 0; row < means; row += 1)
          values[row] = (values[row] as number) + (even[row] as number);
      return values;
    });
    EXPECTATIONS.forEach(({ k, mean, sd }, index) => {
      residuals[means + index] =
        ((point[k] as number) - mean) / sd - (expectedOff[index] as number);
      (slopes[k] as Float64Array)[means + index] = 1 / sd;
    });
    return { residuals, slopes };
  };
}

/** The annular means that a stent has, kernel after kernel. */
export function roundMeans(
  annuli: readonly Annuli[],
  { kernels }: Apodisation,
  parameters: StentParameters,
): Float64Array {
  const { value } = stentSpectrum(parameters);
  const isFirst = firstKernel(annuli);
  let row = -1;
  return Float64Array.from(
    annuli.flatMap(({ waves }, kernel) => {
      const response = kernels[kernel]?.response as Float64Array;
      return waves.map((wave) => {
        row += 1;
        let sum = parameters.fatHu + parameters.levelHu * (isFirst[row] as number);
        for (let f = 0; f < wave.length; f += 1)
          sum += (wave[f] as number) * (response[f] as number) * (value[f] as number);
        return sum;
      });
    }),
  );
}

/** 1 for the means of the first of two kernels. */
function firstKernel(annuli: readonly Annuli[]): Float64Array {
  return Float64Array.from(
    annuli.flatMap(({ waves }, kernel) =>
      waves.map(() => (kernel === 0 && annuli.length > 1 ? 1 : 0)),
    ),
  );
}

/** L⁻¹ times what a wave of each frequency shows in each mean. */
function whitenedWaves(
  annuli: readonly Annuli[],
  { kernels }: Apodisation,
  lower: readonly Float64Array[],
): readonly Float64Array[] {
  const waves = annuli.flatMap((one, kernel) => {
    const response = kernels[kernel]?.response as Float64Array;
    return one.waves.map((wave) => wave.map((value, f) => value * (response[f] as number)));
  });
  waves.forEach((wave, row) => {
    const line = lower[row] as Float64Array;
    for (let before = 0; before < row; before += 1) {
      const factor = line[before] as number;
      const earlier = waves[before] as Float64Array;
      for (let f = 0; f < FREQUENCIES.length; f += 1)
        wave[f] = (wave[f] as number) - factor * (earlier[f] as number);
    }
    const scale = 1 / (line[row] as number);
    for (let f = 0; f < FREQUENCIES.length; f += 1) wave[f] = (wave[f] as number) * scale;
  });
  return waves;
}
