import { type Kernel, seededUniform, type UniformSource } from '../../../core/phantom/index.js';
import {
  type FittedStent,
  fitStentOn,
  type SeenBy,
  type StentKernel,
} from '../../../core/stent/index.js';
import { noStentScene } from './noStentScene.js';
import { type PlainReading, plainReading } from './plainReading.js';
import { type StentPair, stentPair } from './stentPhantom.js';
import { drawStents, stentSlice, type TrueStent } from './stentScene.js';

/** Which images a fit was given. */
export type FittedOn = 'both' | 'soft' | 'sharp';
export const FITTED_ON: readonly FittedOn[] = ['both', 'soft', 'sharp'];

/** One stent and what the fits of it came to. */
export interface GridCase {
  readonly truth: TrueStent;
  readonly fits: Readonly<Partial<Record<FittedOn, FittedStent>>>;
  /** What is read without a fit. */
  readonly plain: Readonly<Partial<Record<'soft' | 'sharp', PlainReading>>>;
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

/** What the stents of a grid are like. */
export interface GridScene {
  readonly areWires?: boolean;
  /** Least and most angle between axis and the slices' normal. */
  readonly tiltDeg?: readonly [number, number];
}

/** Images of seven stents, and what is drawn further from the same numbers. */
export interface GridPair {
  readonly pair: StentPair;
  readonly stents: readonly TrueStent[];
  readonly kernels: (typeof STENT_KERNELS)[number];
  readonly uniform: UniformSource;
}

/** One acquisition of seven stents. */
export async function gridPair(
  batch: number,
  index: number,
  { areWires = false, tiltDeg = [0, 20] }: GridScene = {},
): Promise<GridPair> {
  const uniform = seededUniform(batch, index, 1);
  const [least, most] = tiltDeg;
  const stents = drawStents(uniform, most - least, areWires).map((stent) => ({
    ...stent,
    tiltDeg: stent.tiltDeg + least,
  }));
  const kernels = STENT_KERNELS[index % STENT_KERNELS.length] as (typeof STENT_KERNELS)[number];
  const pair = await stentPair((zMm) => stentSlice(stents, zMm, 380), {
    seed: seededInteger(batch, index),
    photonsPerRay: 5e3 * 5 ** uniform(),
    kernels,
  });
  return { pair, stents, kernels, uniform };
}

/** Seven stents of one acquisition. */
export async function gridCases(
  batch: number,
  index: number,
  fittedOn: readonly FittedOn[] = FITTED_ON,
  scene?: GridScene,
): Promise<readonly GridCase[]> {
  const { pair, stents, uniform } = await gridPair(batch, index, scene);
  return casesOf(pair, stents, uniform, fittedOn);
}

/** A start up to half the inner radius off the axis. */
export function startOf(
  { centreMm: [x, y], innerDiameterMm }: TrueStent,
  uniform: UniformSource,
): readonly [number, number, number] {
  const angle = 2 * Math.PI * uniform();
  const away = (innerDiameterMm / 4) * Math.sqrt(uniform());
  return [x + away * Math.cos(angle), y + away * Math.sin(angle), 0.2 * (uniform() - 0.5)];
}

/** Fits and reads all stents of a pair. */
export function casesOf(
  pair: StentPair,
  stents: readonly TrueStent[],
  uniform: UniformSource,
  fittedOn: readonly FittedOn[],
): readonly GridCase[] {
  return stents.map((truth) => {
    const centreMm = startOf(truth, uniform);
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
    const plain = {
      soft: plainReading(pair, 'soft', truth),
      sharp: plainReading(pair, 'sharp', truth),
    };
    return { truth, fits, plain, timeMs };
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
  seenBy?: SeenBy,
): FittedStent {
  if (texture.soft === null || texture.sharp === null) throw new RangeError('no texture measured');
  const all: Readonly<Record<'soft' | 'sharp', StentKernel>> = {
    soft: { stack: soft.stack, texture: texture.soft },
    sharp: { stack: sharp.stack, texture: texture.sharp },
  };
  const kernels = side === 'both' ? [all.soft, all.sharp] : [all[side]];
  return fitStentOn(
    { centreMm },
    kernels,
    (stack, slice) => (stack === soft.stack ? soft : sharp).stored.at(slice),
    seenBy,
  );
}

function seededInteger(batch: number, index: number): number {
  return Math.floor(seededUniform(batch, index, 3)() * 2 ** 31);
}
