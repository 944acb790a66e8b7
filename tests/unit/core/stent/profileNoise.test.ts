import { describe, expect, it } from 'vitest';
import { profileNoiseHu } from '../../../../core/stent/profileNoise.js';

describe('profileNoiseHu', () => {
  // A flat spectrum of 10 HU²·mm² up to 1 per mm: the variance is its area, 10·π·1² (Parseval).
  const frequencyPerMm = Array.from({ length: 200 }, (_, ring) => 0.005 * (ring + 0.5));
  const flat = { frequencyPerMm, powerHu2Mm2: frequencyPerMm.map(() => 10) };

  it('is the SD of a pixel for a line without width', () => {
    expect(profileNoiseHu(flat, 0)).toBeCloseTo(Math.sqrt(10 * Math.PI), 1);
  });

  it('falls with the root of a wide band: what is left has the spectrum at frequency 0 across it', () => {
    // ∫ sinc² over f_across is 1/b, and f_along runs from −1 to 1 there: 10·2/b.
    expect(profileNoiseHu(flat, 20)).toBeCloseTo(Math.sqrt((10 * 2) / 20), 1);
  });
});
