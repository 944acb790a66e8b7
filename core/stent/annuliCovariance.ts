import type { Annuli } from './annuli.js';
import { type Apodisation, BAND_STEP_PER_MM } from './apodisation.js';
import { FREQUENCIES, RING_AREAS } from './frequencies.js';

/** Noise that no power spectrum tells: rounding of the values, resampling; part of the variance of each mean. */
const OWN_PART = 0.04;
/** A surrounding that isn't even: SD of a bowl-shaped part at the outermost annulus, the same on both kernels, HU. */
const BOWL_HU = 6;
/** The scale sets in above this frequency: W is 1 at 0 whatever the noise tells, per mm. */
const SCALE_FROM_PER_MM = 0.1;

/** What the noise of the images and the uncertainty of W do to the annular means of all kernels together. */
export interface Uncertainty {
  readonly apodisation: Apodisation;
  /** Variance here over that of the areas in which the spectrum was measured. */
  readonly noiseFactor: number;
  /** Slices whose noise is independent, of as many as there are. */
  readonly independentPart: number;
}

/**
 * Covariance of the annular means, kernel after kernel. The kernels share their quanta, so their noise is coherent: the cross
 * spectrum is √(NPS₁·NPS₂), and means of the two kernels hang together. To the noise are added the ways in which W itself
 * may be wrong, seen through the spectrum of the stent (`spectrum`, of {@link stentSpectrum}).
 */
export function annuliCovariance(
  annuli: readonly Annuli[],
  spectrum: Float64Array,
  { apodisation, noiseFactor, independentPart }: Uncertainty,
): readonly Float64Array[] {
  const places = annuli.flatMap((one, kernel) =>
    one.waves.map((waves, index) => ({ kernel, waves, radiusMm: one.radiusMm[index] as number })),
  );
  const covariance = places.map(() => new Float64Array(places.length));
  const noisy = places.map(({ kernel, waves }) => {
    const amplitude = apodisation.kernels[kernel]?.amplitude as Float64Array;
    return waves.map(
      (wave, f) => wave * (amplitude[f] as number) * Math.sqrt(RING_AREAS[f] as number),
    );
  });
  places.forEach(({ kernel }, row) => {
    for (let column = 0; column <= row; column += 1) {
      const other = places[column]?.kernel as number;
      // Slices that only one of the kernels has share nothing.
      const slices = Math.max(annuli[kernel]?.slices as number, annuli[other]?.slices as number);
      const value =
        (noiseFactor * product(noisy[row] as Float64Array, noisy[column] as Float64Array)) /
        (slices * independentPart);
      set(covariance, row, column, value * (row === column ? 1 + OWN_PART : 1));
    }
  });
  const outermost = Math.max(...places.map(({ radiusMm }) => radiusMm));
  addMode(
    covariance,
    places.map(({ radiusMm }) => BOWL_HU * (radiusMm / outermost) ** 2),
  );
  for (const { error, shape } of responseErrors(apodisation))
    addMode(
      covariance,
      places.map(({ kernel, waves }) => {
        const response = apodisation.kernels[kernel]?.response as Float64Array;
        let sum = 0;
        for (let f = 0; f < waves.length; f += 1)
          sum +=
            (waves[f] as number) *
            (response[f] as number) *
            (spectrum[f] as number) *
            (shape[f] as number);
        return error * sum;
      }),
    );
  annuli.forEach((_, own) => {
    const endError = apodisation.kernels[own]?.endError as Float64Array;
    for (const shape of [...OWN_SHAPES, endError])
      addMode(
        covariance,
        places.map(({ kernel, waves }) => {
          if (kernel !== own) return 0;
          let sum = 0;
          for (let f = 0; f < waves.length; f += 1)
            sum += (waves[f] as number) * (spectrum[f] as number) * (shape[f] as number);
          return sum;
        }),
      );
  });
  return covariance;
}

/** Each kernel's W may be wrong by this for itself, in bands of this width, per mm. */
const OWN_ERROR = 0.012;
const OWN_STEP_PER_MM = 0.15;
const OWN_SHAPES = Array.from({ length: 8 }, (_, band) =>
  FREQUENCIES.map((f) => OWN_ERROR * Math.max(0, 1 - Math.abs(f / OWN_STEP_PER_MM - band - 1))),
);

/** Shapes of a relative error of W over the frequencies, with their size. */
function responseErrors({ scaleError, bands }: Apodisation) {
  return [
    {
      error: scaleError,
      shape: FREQUENCIES.map((f) => 1 - Math.exp(-((f / SCALE_FROM_PER_MM) ** 2))),
    },
    ...bands.map(({ atPerMm, error }) => ({
      error,
      shape: FREQUENCIES.map((f) => Math.max(0, 1 - Math.abs(f - atPerMm) / BAND_STEP_PER_MM)),
    })),
  ];
}

function product(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let index = 0; index < a.length; index += 1)
    sum += (a[index] as number) * (b[index] as number);
  return sum;
}

function set(matrix: readonly Float64Array[], row: number, column: number, value: number): void {
  (matrix[row] as Float64Array)[column] = value;
  (matrix[column] as Float64Array)[row] = value;
}

/** Adds the covariance of one pattern whose size is unknown with SD 1. */
function addMode(matrix: readonly Float64Array[], pattern: readonly number[]): void {
  matrix.forEach((line, row) => {
    for (let column = 0; column < line.length; column += 1)
      line[column] =
        (line[column] as number) + (pattern[row] as number) * (pattern[column] as number);
  });
}
