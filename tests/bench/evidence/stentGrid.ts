import { type Kernel, seededUniform } from '../../../core/phantom/index.js';
import { type FittedStent, fitStentOn, type StentKernel } from '../../../core/stent/index.js';
import { noStentScene } from './noStentScene.js';
import { type StentPair, stentPair } from './stentPhantom.js';
import { drawStents, stentSlice, strutDiameterMm, type TrueStent } from './stentScene.js';

/** Which images a fit was given. */
export type FittedOn = 'both' | 'soft' | 'sharp';
export const FITTED_ON: readonly FittedOn[] = ['both', 'soft', 'sharp'];

/** One stent and what the fits of it came to. */
export interface GridCase {
  readonly truth: TrueStent;
  readonly fits: Readonly<Partial<Record<FittedOn, FittedStent>>>;
  /** Processor time of the fit on both kernels, ms. */
  readonly timeMs: number;
}

/** Pairs of kernels: rolling off smoothly, nearly so, and broken off. */
export const STENT_KERNELS: readonly { readonly soft: Kernel; readonly sharp: Kernel }[] = [
  {
    soft: { apodisation: 'hann', cutOffPerMm: 0.62 },
    sharp: { apodisation: 'cosine', cutOffPerMm: 1.26 },
  },
  {
    soft: { apodisation: 'hann', cutOffPerMm: 0.75 },
    sharp: { apodisation: 'hamming', cutOffPerMm: 1.2 },
  },
  {
    soft: { apodisation: 'cosine', cutOffPerMm: 0.65 },
    sharp: { apodisation: 'shepp-logan', cutOffPerMm: 1.1 },
  },
];

/** Seven stents of one acquisition. Starts lie up to half the inner radius off the axis. */
export async function gridCases(
  batch: number,
  index: number,
  fittedOn: readonly FittedOn[] = FITTED_ON,
  areWires = false,
): Promise<readonly GridCase[]> {
  const uniform = seededUniform(batch, index, 1);
  const stents = drawStents(uniform, 20, areWires);
  const kernels = STENT_KERNELS[index % STENT_KERNELS.length] as (typeof STENT_KERNELS)[number];
  const pair = await stentPair((zMm) => stentSlice(stents, zMm, 380), {
    seed: seededInteger(batch, index),
    photonsPerRay: 5e3 * 5 ** uniform(),
    kernels,
  });
  return stents.map((truth) => {
    const angle = 2 * Math.PI * uniform();
    const away = (truth.innerDiameterMm / 4) * Math.sqrt(uniform());
    const centreMm = [
      truth.centreMm[0] + away * Math.cos(angle),
      truth.centreMm[1] + away * Math.sin(angle),
      0.2 * (uniform() - 0.5),
    ] as const;
    let timeMs = 0;
    const fits = Object.fromEntries(
      fittedOn.map((side) => {
        const before = process.cpuUsage();
        const fit = fitOn(pair, side, centreMm);
        const spent = process.cpuUsage(before);
        if (side === 'both') timeMs = (spent.user + spent.system) / 1000;
        return [side, fit];
      }),
    );
    return { truth, fits, timeMs };
  });
}

/** A place without a stent, and what a fit to it came to. */
export interface BareCase {
  readonly kind: string;
  readonly fit: FittedStent;
}

/** Twenty places of one acquisition that have no stent. */
export async function bareCases(batch: number, index: number): Promise<readonly BareCase[]> {
  const uniform = seededUniform(batch, index, 2);
  const scene = noStentScene(uniform);
  const pair = await stentPair(() => scene.slice, {
    seed: seededInteger(batch, 1000 + index),
    photonsPerRay: 5e3 * 5 ** uniform(),
    kernels: STENT_KERNELS[index % STENT_KERNELS.length] as (typeof STENT_KERNELS)[number],
  });
  return scene.places.map(({ kind, atMm: [x, y] }) => ({
    kind,
    fit: fitOn(pair, 'both', [x + 0.6 * (uniform() - 0.5), y + 0.6 * (uniform() - 0.5), 0]),
  }));
}

/** Fits one place of a pair on the kernels that are named. */
export function fitOn(
  { soft, sharp, texture }: StentPair,
  side: FittedOn,
  centreMm: readonly [number, number, number],
): FittedStent {
  if (texture.soft === null || texture.sharp === null) throw new RangeError('no texture measured');
  const all: Readonly<Record<'soft' | 'sharp', StentKernel>> = {
    soft: { stack: soft.stack, texture: texture.soft },
    sharp: { stack: sharp.stack, texture: texture.sharp },
  };
  const kernels = side === 'both' ? [all.soft, all.sharp] : [all[side]];
  return fitStentOn({ centreMm }, kernels, (stack, slice) =>
    (stack === soft.stack ? soft : sharp).stored.at(slice),
  );
}

/** What fits of one kind came to. */
export interface GridSummary {
  readonly fits: number;
  readonly refused: Readonly<Record<string, number>>;
  readonly diameterMm: Accuracy;
  readonly lumenHu: Accuracy;
}

/** Absolute errors, and the share of truths within 1.96 standard errors of the fit and of the refits. */
export interface Accuracy {
  readonly median: number;
  readonly most95: number;
  readonly covered: number;
  readonly coveredByRefits: number;
}

export function summaryOf(cases: readonly GridCase[], side: FittedOn): GridSummary {
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

interface Deviation {
  readonly off: number;
  readonly se: number;
  readonly refitted: number;
}

function accuracyOf(all: readonly Deviation[]): Accuracy {
  const sizes = all.map(({ off }) => Math.abs(off)).sort((a, b) => a - b);
  const at = (part: number): number =>
    sizes[Math.min(sizes.length - 1, Math.floor(sizes.length * part))] ?? Number.NaN;
  const within = (error: (one: Deviation) => number): number =>
    all.filter((one) => Math.abs(one.off) <= 1.96 * error(one)).length / Math.max(1, all.length);
  return {
    median: at(0.5),
    most95: at(0.95),
    covered: within(({ se }) => se),
    coveredByRefits: within(({ refitted }) => refitted),
  };
}

function seededInteger(batch: number, index: number): number {
  return Math.floor(seededUniform(batch, index, 3)() * 2 ** 31);
}
