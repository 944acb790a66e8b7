import { describe, expect, it } from 'vitest';
import { visibleDisc } from '../../core/quality/index.js';
import {
  measuredTextures,
  simulatedDiscs,
  simulatedVisibleMm,
} from '../bench/evidence/observer.js';
import { MOST_APART, OBSERVER_RECIPE } from '../bench/evidence/observerReport.js';

/**
 * A small sample of what npm run evidence does at length: 132 looks at slices with a disc and as many without, whose
 * spread alone moves the simulated diameter by about 4 %.
 */
describe('The smallest visible disc from the measured texture', () => {
  it('agrees within 15 % with a simulated matched-filter observer on the phantom, on both kernels', async () => {
    const recipe = { ...OBSERVER_RECIPE, diametersMm: [1, 1.6], realisations: 12 };
    const textures = await measuredTextures(recipe);
    const discs = simulatedDiscs(recipe);
    for (const side of ['soft', 'sharp'] as const) {
      const seenMm = simulatedVisibleMm(discs, side, recipe.contrastHu, 100, 4);
      const formula = visibleDisc(textures[side], 100, 4);
      expect(formula.ok).toBe(true);
      if (!formula.ok || seenMm === undefined) throw new Error(`not between 1 and 1.6 mm: ${side}`);
      expect(Math.abs(formula.value / seenMm - 1)).toBeLessThan(MOST_APART);
    }
  }, 120_000);
});
