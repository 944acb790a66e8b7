import { describe, expect, it } from 'vitest';
import {
  addRings,
  meanFrequency,
  noisePower,
  peakFrequency,
  radialSpectrum,
  ringSums,
} from '../../../../core/quality/index.js';

/** A wave along x of a whole number of periods, on `count`² pixels. */
const wave = (count: number, periods: number): Float64Array =>
  Float64Array.from({ length: count * count }, (_, index) =>
    Math.cos((2 * Math.PI * periods * (index % count)) / count),
  );

describe('radial spectra', () => {
  it('find the frequency of a wave', () => {
    // 4 periods in 16 pixels of 0.5 mm: 0.5 per mm.
    const spectrum = radialSpectrum(
      ringSums(noisePower(wave(16, 4), 16, 16, [0.5, 0.5]), 0.125, 9),
    );
    expect(peakFrequency(spectrum)).toBe(0.5);
    expect(meanFrequency(spectrum)).toBeCloseTo(0.5, 9);
  });

  it('fold what a coarser grid can’t carry to where that grid would show it', () => {
    // 6 periods in 8 mm are 0.75 per mm. On pixels of 1 mm that is 0.25 per mm: |0.75 − 1|.
    const fine = noisePower(wave(16, 6), 16, 16, [0.5, 0.5]);
    const coarse = Float64Array.from(
      { length: 64 },
      (_, index) => wave(16, 6)[2 * (index % 8) + 32 * Math.floor(index / 8)] ?? 0,
    );
    const seen = radialSpectrum(ringSums(noisePower(coarse, 8, 8, [1, 1]), 0.125, 5));
    const folded = radialSpectrum(ringSums(fine, 0.125, 5, [0.5, 0.5]));
    expect(peakFrequency(folded)).toBe(0.25);
    expect(folded.frequencyPerMm).toEqual(seen.frequencyPerMm);
    folded.powerHu2Mm2.forEach((power, k) => {
      expect(power).toBeCloseTo(seen.powerHu2Mm2[k] ?? Number.NaN, 9);
    });
  });

  it('are the mean over areas, and without one where it is left out', () => {
    const [a, b] = [2, 4].map((periods) =>
      ringSums(noisePower(wave(16, periods), 16, 16, [0.5, 0.5]), 0.125, 9),
    );
    if (a === undefined || b === undefined) throw new Error('no sums');
    expect(meanFrequency(radialSpectrum(addRings([a, b], 0)))).toBeCloseTo(0.5, 9);
    const both = radialSpectrum(addRings([a, b])).powerHu2Mm2;
    expect(both[1]).toBeCloseTo((radialSpectrum(a).powerHu2Mm2[1] ?? 0) / 2, 9);
  });

  it('have no mean and no peak without power', () => {
    const nothing = radialSpectrum(
      ringSums(noisePower(new Float64Array(16), 4, 4, [1, 1]), 0.1, 6),
    );
    expect([meanFrequency(nothing), peakFrequency(nothing)]).toEqual([undefined, undefined]);
  });
});
