import { add, scale } from '../geometry/index.js';
import { blurMargin, blurSamples } from './blurSamples.js';
import type { ComplexImage, SpectrumMaker } from './gradientSpectrum.js';
import { type HuPlane, type SampleGrid, samplePlane } from './huPlane.js';

/** Values below are no tissue but a scanner's mark for “outside the scan”, HU: their border is no structure. */
const OUTSIDE_SCAN_HU = -1500;

/** Spectra that were made of each plane, by place and blur: one square is asked for by several measures. */
export type KeptSpectra = Map<HuPlane, Map<string, ComplexImage | undefined>>;

/**
 * Spectrum of a square of a plane; undefined where the plane has no values there.
 *
 * @param blurSigma of a Gaussian that the samples are blurred by first, samples
 */
export function squareSpectrum(
  plane: HuPlane,
  square: SampleGrid,
  maker: SpectrumMaker,
  kept: KeptSpectra,
  blurSigma = 0,
): ComplexImage | undefined {
  const ofPlane = kept.get(plane) ?? new Map<string, ComplexImage | undefined>();
  kept.set(plane, ofPlane);
  const key = [...square.cornerMm.map((part) => part.toFixed(4)), blurSigma].join(' ');
  if (ofPlane.has(key)) return ofPlane.get(key);
  const made = makeSpectrum(plane, square, maker, blurSigma);
  ofPlane.set(key, made);
  return made;
}

function makeSpectrum(
  plane: HuPlane,
  square: SampleGrid,
  maker: SpectrumMaker,
  blurSigma: number,
): ComplexImage | undefined {
  const margin = blurMargin(blurSigma);
  const outer = { ...moveSquare(square, -margin, -margin), size: square.size + 2 * margin };
  const samples = samplePlane(plane, outer);
  if (samples === undefined || reachesOutside(samples)) return undefined;
  return maker.gradientSpectrum(blurSamples(samples, square.size, blurSigma));
}

/** A square moved by samples along its own axes. */
export function moveSquare(square: SampleGrid, column: number, row: number): SampleGrid {
  const { rowDirection, columnDirection, stepMm } = square;
  const along = add(scale(rowDirection, column * stepMm), scale(columnDirection, row * stepMm));
  return { ...square, cornerMm: add(square.cornerMm, along) };
}

function reachesOutside(samples: Float64Array): boolean {
  for (let index = 0; index < samples.length; index += 1) {
    if ((samples[index] as number) < OUTSIDE_SCAN_HU) return true;
  }
  return false;
}
