import type { FittedOn, GridCase } from './stentGrid.js';
import { strutDiameterMm } from './stentScene.js';

/** Absolute errors, and the share of truths within 1.96 standard errors of the fit and of the refits. */
export interface Accuracy {
  readonly values: number;
  readonly median: number;
  readonly most95: number;
  /** Not a number where no standard error is stated. */
  readonly covered: number;
  readonly coveredByRefits: number;
}

/** What one way of reading came to. */
export interface GridSummary {
  readonly fits: number;
  readonly refused: Readonly<Record<string, number>>;
  readonly diameterMm: Accuracy;
  readonly lumenHu: Accuracy;
}

/** Fits on one kernel or on both. */
export function summaryOf(
  cases: readonly Pick<GridCase, 'truth' | 'fits'>[],
  side: FittedOn,
): GridSummary {
  const refused: Record<string, number> = {};
  const diameters: Deviation[] = [];
  const lumens: Deviation[] = [];
  for (const { truth, fits } of cases) {
    const fit = fits[side];
    if (fit === undefined) continue;
    if (fit.reason !== undefined) {
      refused[fit.reason.code] = (refused[fit.reason.code] ?? 0) + 1;
      continue;
    }
    const { strutDiameterMm: d, lumenHu: l, refitted } = fit;
    diameters.push({
      off: d.value - strutDiameterMm(truth),
      se: d.se,
      refitted: refitted?.strutDiameterMm ?? 0,
    });
    lumens.push({ off: l.value - truth.lumenHu, se: l.se, refitted: refitted?.lumenHu ?? 0 });
  }
  return {
    fits: diameters.length,
    refused,
    diameterMm: accuracyOf(diameters),
    lumenHu: accuracyOf(lumens),
  };
}

/** The plain region's mean against the lumen. */
export function regionAccuracy(cases: readonly GridCase[], side: 'soft' | 'sharp'): Accuracy {
  return accuracyOf(
    cases.flatMap(({ truth, plain }) => {
      const { regionHu = null, regionErrorHu = null } = plain[side] ?? {};
      return regionHu === null
        ? []
        : [{ off: regionHu - truth.lumenHu, se: regionErrorHu ?? Number.NaN, refitted: 0 }];
    }),
  );
}

/** The width at half height against the inner diameter, and the level between the struts against the lumen. */
export function halfHeightAccuracy(
  cases: readonly GridCase[],
  side: 'soft' | 'sharp',
): { readonly diameterMm: Accuracy; readonly lumenHu: Accuracy } {
  const read = cases.flatMap(({ truth, plain }) => {
    const { visibleWidthMm = null, levelHu = null } = plain[side] ?? {};
    return visibleWidthMm === null || levelHu === null ? [] : [{ truth, visibleWidthMm, levelHu }];
  });
  const bare = (off: number): Deviation => ({ off, se: Number.NaN, refitted: Number.NaN });
  return {
    diameterMm: accuracyOf(
      read.map(({ truth, visibleWidthMm }) => bare(visibleWidthMm - truth.innerDiameterMm)),
    ),
    lumenHu: accuracyOf(read.map(({ truth, levelHu }) => bare(levelHu - truth.lumenHu))),
  };
}

interface Deviation {
  readonly off: number;
  readonly se: number;
  readonly refitted: number;
}

function accuracyOf(all: readonly Deviation[]): Accuracy {
  const sizes = all.map(({ off }) => Math.abs(off)).sort((a, b) => a - b);
  const at = (part: number): number =>
    sizes[Math.min(sizes.length - 1, Math.floor(sizes.length * part))] ?? Number.NaN;
  const within = (error: (one: Deviation) => number): number => {
    const known = all.filter((one) => !Number.isNaN(error(one)));
    const inside = known.filter((one) => Math.abs(one.off) <= 1.96 * error(one));
    return known.length === 0 ? Number.NaN : inside.length / known.length;
  };
  return {
    values: all.length,
    median: at(0.5),
    most95: at(0.95),
    covered: within(({ se }) => se),
    coveredByRefits: within(({ refitted }) => refitted),
  };
}
