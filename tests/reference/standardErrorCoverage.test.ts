import { describe, expect, it } from 'vitest';
import { coverageOf } from '../bench/evidence/standardError.js';

/**
 * The truth is the mean of the same pixels on the same phantom without noise. `npm run evidence` does the same with
 * 1,000 placements on each of four phantoms; this is a sample of it on coarser pixels.
 */
describe('The standard error of a mean', () => {
  it('covers the mean without noise in 95 of 100 placements on both kernels, where SD/√n does not', {
    timeout: 60_000,
  }, async () => {
    const { soft, sharp } = await coverageOf({
      scene: 1,
      photonsPerRay: 1.6e5,
      kernels: {
        soft: { apodisation: 'hann', cutOffPerMm: 0.62 },
        sharp: { apodisation: 'cosine', cutOffPerMm: 1.1 },
      },
      grid: { centreMm: [10, -16], fieldOfViewMm: 110, matrix: 240 },
      views: 360,
      scans: 16,
      placements: 25,
    });
    for (const [all] of [soft, sharp]) {
      // 400 placements: the share itself is known to ± 2 %.
      const share = (all?.stated ?? 0) / (all?.placements ?? 1);
      expect(all?.placements).toBe(400);
      expect(share).toBeGreaterThan(0.91);
      expect(share).toBeLessThan(0.985);
    }
    expect((soft[0]?.naive ?? 0) / 400).toBeLessThan(0.75);
    expect((sharp[0]?.naive ?? 0) / 400).toBeLessThan(0.92);
  });
});
