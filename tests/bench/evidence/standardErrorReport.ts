import { type Coverage, type CoverageRecipe, coverageOf, GROUPS, SIDES } from './standardError.js';

const GRID = { centreMm: [10, -16], fieldOfViewMm: 110, matrix: 280 } as const;

/** 1,000 placements each: the demonstration's kernels on three phantoms, and two other kernels. */
export const COVERAGE_RECIPES: readonly CoverageRecipe[] = [
  ...[0, 1, 2].map(
    (scene): CoverageRecipe => ({
      scene,
      photonsPerRay: 1.6e5,
      kernels: {
        soft: { apodisation: 'hann', cutOffPerMm: 0.62 },
        sharp: { apodisation: 'cosine', cutOffPerMm: 1.26 },
      },
      grid: GRID,
      views: 480,
      scans: 40,
      placements: 25,
    }),
  ),
  {
    scene: 3,
    photonsPerRay: 8e4,
    kernels: {
      soft: { apodisation: 'cosine', cutOffPerMm: 0.7 },
      sharp: { apodisation: 'shepp-logan', cutOffPerMm: 1.1 },
    },
    grid: { centreMm: [10, -16], fieldOfViewMm: 110, matrix: 220 },
    views: 480,
    scans: 40,
    placements: 25,
  },
];

/** The standard error must cover the truth in this share of placements, and this much more or less. */
export const WANTED_SHARE = 0.95;
export const SHARE_TOLERANCE = 0.03;

export function isCovered({ placements }: Coverage, covered: number): boolean {
  return Math.abs(covered / placements - WANTED_SHARE) <= SHARE_TOLERANCE;
}

/** Prints the coverage on each phantom and kernel. @returns whether all lie within the tolerance */
export async function reportStandardError(print: (line: string) => void): Promise<boolean> {
  print('Standard error of a mean: share of random placements in which 1.96 of it cover the truth');
  let [kernels, kept, naive] = [0, 0, 0];
  for (const recipe of COVERAGE_RECIPES) {
    const found = await coverageOf(recipe);
    for (const side of SIDES) {
      const { apodisation, cutOffPerMm } = recipe.kernels[side];
      print(`  phantom ${recipe.scene}, ${side}: ${apodisation} ${cutOffPerMm} /mm`);
      found[side].forEach((coverage, group) => {
        print(`    ${groupName(group).padEnd(18)} ${coverageLine(coverage)}`);
      });
      const [all] = found[side];
      if (all === undefined) throw new RangeError('no placements');
      kernels += 1;
      if (isCovered(all, all.stated)) kept += 1;
      // Over all sizes the errors of SD/√n may cancel: too small for small regions, too large for large ones.
      if (found[side].every((group) => isCovered(group, group.naive))) naive += 1;
    }
  }
  const isKept = kept === kernels;
  print(`${isKept ? 'kept' : 'MISSED'}: 95 ± 3 % on ${kept} of ${kernels} kernels`);
  print(`SD/√n: 95 ± 3 % at every size on ${naive} of ${kernels} kernels`);
  return isKept && naive === 0;
}

function groupName(group: number): string {
  const [least, most] = GROUPS[group] ?? [0, Infinity];
  if (least === 0 && most === Infinity) return 'all';
  return most === Infinity ? `radius over ${least} mm` : `radius under ${most} mm`;
}

function coverageLine({ placements, stated, naive, ratio }: Coverage): string {
  const percent = (count: number): string => `${((100 * count) / placements).toFixed(1)} %`;
  return `${`${placements}`.padStart(5)} placements: stated ${percent(stated)}, SD/√n ${percent(naive)}; error / stated error ${ratio.toFixed(2)}`;
}
