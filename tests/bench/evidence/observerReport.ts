import { visibleDisc } from '../../../core/quality/index.js';
import {
  formulaDetectability,
  measuredTextures,
  type ObserverRecipe,
  SIDES,
  simulatedDiscs,
  simulatedVisibleMm,
} from './observer.js';

/** The smallest visible disc by the formula may differ from the simulated observer's by this share. */
export const MOST_APART = 0.15;

/** The demonstration's kernels at about its noise. */
export const OBSERVER_RECIPE: ObserverRecipe = {
  seed: 5,
  photonsPerRay: 3e4,
  kernels: {
    soft: { apodisation: 'hann', cutOffPerMm: 0.62 },
    sharp: { apodisation: 'cosine', cutOffPerMm: 1.26 },
  },
  contrastHu: 100,
  diametersMm: [0.6, 0.8, 1, 1.4, 2, 2.8, 4, 5.6],
  realisations: 60,
};

/** Another pair of kernels, farther apart, with more noise. */
const OTHER_RECIPE: ObserverRecipe = {
  ...OBSERVER_RECIPE,
  seed: 6,
  photonsPerRay: 1.5e4,
  kernels: {
    soft: { apodisation: 'hamming', cutOffPerMm: 0.55 },
    sharp: { apodisation: 'shepp-logan', cutOffPerMm: 1.1 },
  },
};

const CONTRASTS_HU = [20, 30, 60, 100, 200] as const;
const CRITERIA = [3, 4, 5] as const;

/** Tables of formula against simulated observer; true when every visible disc is within the limit. */
export async function reportObserver(print: (line: string) => void): Promise<boolean> {
  const shares: number[] = [];
  for (const recipe of [OBSERVER_RECIPE, OTHER_RECIPE])
    shares.push(...(await table(recipe, print)));
  const worst = Math.max(...shares.map(Math.abs));
  const kept = worst <= MOST_APART;
  print(
    `${kept ? 'kept' : 'MISSED'}: smallest visible disc within ${Math.round(worst * 100)} % of the simulated observer, budget ${MOST_APART * 100} %`,
  );
  return kept;
}

async function table(
  recipe: ObserverRecipe,
  print: (line: string) => void,
): Promise<readonly number[]> {
  const textures = await measuredTextures(recipe);
  const discs = simulatedDiscs(recipe);
  const shares: number[] = [];
  for (const side of SIDES) {
    const { apodisation, cutOffPerMm } = recipe.kernels[side];
    print(
      `What could be seen, ${side} (${apodisation} ${cutOffPerMm}): formula, simulated observer`,
    );
    for (const { diameterMm, detectability } of discs) {
      const formula = formulaDetectability(textures[side], diameterMm, recipe.contrastHu);
      print(
        `  d′ of ${diameterMm.toFixed(1)} mm at ${recipe.contrastHu} HU ${formula.toFixed(2).padStart(7)} ${detectability[side].toFixed(2).padStart(7)}`,
      );
    }
    for (const contrastHu of CONTRASTS_HU) {
      for (const k of CRITERIA) {
        const seen = simulatedVisibleMm(discs, side, recipe.contrastHu, contrastHu, k);
        const formula = visibleDisc(textures[side], contrastHu, k);
        if (seen === undefined) continue;
        if (!formula.ok) throw new RangeError(formula.refusal.text);
        const share = formula.value / seen - 1;
        shares.push(share);
        print(
          `  ${String(contrastHu).padStart(3)} HU, k ${k}: ${formula.value.toFixed(2)} mm, ${seen.toFixed(2)} mm, ${share < 0 ? '−' : '+'}${Math.abs(share * 100).toFixed(1)} %`,
        );
      }
    }
  }
  return shares;
}
