import { describe, expect, it } from 'vitest';
import { noiseDrawing, noiseSummary } from '../../../../renderer/plots/noiseDrawing.js';

const spectrum = (powerHu2Mm2: readonly number[], meanPerMm: number) => ({
  frequencyPerMm: powerHu2Mm2.map((_, index) => index / 4),
  powerHu2Mm2,
  meanPerMm,
});

describe('The picture of two noise power spectra', () => {
  it('is linear from zero where both are of one size', () => {
    const drawing = noiseDrawing(
      spectrum([9, 40, 20, 0], 0.3),
      spectrum([9, 80, 90, 30], 0.5),
      300,
      200,
    );
    expect(drawing.isLog).toBe(false);
    expect(drawing.powers).toEqual([0, 20, 40, 60, 80, 100]);
    // x: 42 to 290 px for 0 to 0.75 per mm; y: 168 px for 0, 24 px for 100. The place at frequency 0 is left out.
    expect(drawing.x(0.75)).toBe(290);
    expect(drawing.softLine.startsWith('M124.667,110.4')).toBe(true);
  });

  it('is logarithmic over three decades where one is far above the other', () => {
    const drawing = noiseDrawing(
      spectrum([0, 9, 2, 0], 0.3),
      spectrum([0, 300, 700, 90], 0.5),
      300,
      200,
    );
    expect(drawing.isLog).toBe(true);
    expect(drawing.powers).toEqual([1, 10, 100, 1000]);
    // What has no power lies on the axis.
    expect(drawing.softLine.endsWith('290,168')).toBe(true);
  });

  it('has words for those who do not see it', () => {
    expect(noiseSummary(spectrum([9, 40, 20], 0.31), spectrum([9, 80, 90], 0.47))).toBe(
      'Noise power spectra. Soft: highest 40 HU² mm² at 0.25 per mm, mean frequency 0.31 per mm. Sharp: highest 90 HU² mm² at 0.50 per mm, mean frequency 0.47 per mm.',
    );
  });
});
