/**
 * Fitted stents against phantoms whose truth is known: line integrals of ellipses in closed form, photon noise, filtered back
 * projection (core/phantom, itself checked against scikit-image). A sample of what `npm run evidence` prints.
 */
import { beforeAll, describe, expect, it } from 'vitest';
import type { Inset } from '../../core/phantom/index.js';
import { seededUniform } from '../../core/phantom/index.js';
import {
  findStentCentre,
  fitStent,
  measureProfile,
  type StentFit,
} from '../../core/stent/index.js';
import { summaryOf } from '../bench/evidence/stentAccuracy.js';
import { fitOn, gridCases, STENT_KERNELS } from '../bench/evidence/stentGrid.js';
import { type StentPair, stentPair } from '../bench/evidence/stentPhantom.js';
import {
  drawStents,
  stentCentreMm,
  stentSlice,
  strutDiameterMm,
  type TrueStent,
} from '../bench/evidence/stentScene.js';

const FAT_HU = -90;

describe('fitted stents on phantoms', () => {
  it('keep the limits of diameter and lumen on three acquisitions with three pairs of kernels', async () => {
    const cases = (
      await Promise.all([0, 1, 2].map((index) => gridCases(3, index, ['both'])))
    ).flat();
    const { fits, diameterMm, lumenHu } = summaryOf(cases, 'both');
    expect(cases.length).toBe(21);
    expect(fits).toBeGreaterThanOrEqual(20);
    expect(diameterMm.median).toBeLessThan(0.06);
    expect(diameterMm.most95).toBeLessThan(0.15);
    expect(lumenHu.median).toBeLessThan(20);
    // One in twenty-one is beyond the limit of 95 % of them by chance.
    expect(lumenHu.most95).toBeLessThan(75);
    expect(diameterMm.covered).toBeGreaterThan(0.8);
    expect(lumenHu.covered).toBeGreaterThan(0.8);
  }, 60_000);
});

describe('a pair whose sharp stack has another grid', () => {
  it('is fitted as well: places are those of the patient, not of pixels', async () => {
    const stents = drawStents(seededUniform(21, 1), 15);
    const pair = await stentPair((zMm) => stentSlice(stents, zMm, 380), {
      seed: 5,
      photonsPerRay: 1.6e4,
      kernels: STENT_KERNELS[1] as (typeof STENT_KERNELS)[number],
      sharpGrid: { centreMm: [1.3, -0.7], fieldOfViewMm: 94, matrix: 288 },
    });
    const cases = stents.map((truth) => ({
      truth,
      fits: { both: fitOn(pair, 'both', [...truth.centreMm, 0]) },
      timeMs: 0,
    }));
    const { fits, diameterMm, lumenHu } = summaryOf(cases, 'both');
    expect(fits).toBeGreaterThanOrEqual(6);
    expect(diameterMm.most95).toBeLessThan(0.15);
    expect(lumenHu.most95).toBeLessThan(60);
  }, 60_000);
});

describe('where no value may be given', () => {
  let pair: StentPair;
  let stents: readonly TrueStent[];
  const at = (index: number): readonly [number, number, number] => {
    const [x, y] = stents[index]?.centreMm ?? [0, 0];
    return [x + 0.2, y - 0.1, 0];
  };
  const storedOf = (stack: unknown, slice: number) =>
    (stack === pair.soft.stack ? pair.soft : pair.sharp).stored[slice];
  const usual = {
    innerDiameterMm: 3,
    massHuMm: 450,
    lumenHu: 320,
    wallMm: 0.5,
    tiltDeg: 4,
    strutMm: 0.1,
  };

  beforeAll(async () => {
    stents = drawStents(seededUniform(11, 1)).map((stent, index): TrueStent => {
      const common = { ...stent, ...usual };
      // A leaning one, one beside calcium, one beside another, a plain lumen, one that bends, and two plain cases.
      if (index === 1) return { ...common, tiltDeg: 36 };
      if (index === 4) return { ...common, massHuMm: 0 };
      return common;
    });
    const beside = (index: number, zMm: number, away: number, size: number, hu: number): Inset => {
      const stent = stents[index] as TrueStent;
      const [x, y] = stentCentreMm(stent, zMm);
      return {
        name: 'beside',
        hu,
        aroundHu: FAT_HU,
        centreMm: [x + away, y],
        radiiMm: [size, size],
        angleDeg: 0,
      };
    };
    pair = await stentPair(
      (zMm) => {
        const slice = stentSlice(stents, zMm, 380);
        const second = beside(3, zMm, 3.4, 1.2, 4500);
        return {
          ...slice,
          insets: [
            ...slice.insets,
            beside(2, zMm, 3.1, 0.8, 1000),
            second,
            { ...second, hu: 320, aroundHu: 4500, radiiMm: [1.1, 1.1] },
          ],
        };
      },
      {
        seed: 41,
        photonsPerRay: 1.6e4,
        kernels: STENT_KERNELS[0] as (typeof STENT_KERNELS)[number],
      },
    );
  }, 60_000);

  it('a plain stent of the same images is fitted, with all that belongs to it', () => {
    const fit = fitStent(
      { centreMm: at(0), nominalMm: 3 },
      pair.soft.stack,
      pair.sharp.stack,
      storedOf,
      pair.texture,
    );
    if (fit.reason !== undefined) throw new Error(fit.reason.text);
    const truth = stents[0] as TrueStent;
    expect(Math.abs(fit.strutDiameterMm.value - strutDiameterMm(truth))).toBeLessThan(0.1);
    expect(Math.abs(fit.lumenHu.value - truth.lumenHu)).toBeLessThan(50);
    expect(fit.centreMm[0]).toBeCloseTo(truth.centreMm[0], 1);
    expect(fit.centreMm[1]).toBeCloseTo(truth.centreMm[1], 1);
    expect(Math.abs(fit.tiltDeg - truth.tiltDeg)).toBeLessThan(3);
    expect(Math.abs(fit.blurSigmaMm.value - 0.18)).toBeLessThan(0.08);
    expect(fit.kernels.map(({ residual }) => residual.sliceIndex)).toEqual([2, 2]);
    expect(fit.refitted?.refits).toBeGreaterThanOrEqual(8);
    expect(fit.slicesMm).toEqual([-1, -0.5, 0, 0.5, 1]);
    checkResiduals(fit);
  });

  it.each([
    [1, 'a vessel 36° oblique', ['oblique', 'surroundings', 'bent']],
    [2, 'calcium beside', ['surroundings']],
    [3, 'a second stent beside', ['surroundings']],
    [4, 'a lumen without struts', ['no-ring']],
  ] as const)('place %i: %s is refused with a reason that fits', (index, _, codes) => {
    const fit = fitOn(pair, 'both', at(index));
    expect(codes).toContain(fit.reason?.code);
  });

  it('a place in a chamber, near the border and without texture is refused', () => {
    expect(fitOn(pair, 'both', [-24, -24, 0]).reason?.code).toBe('no-vessel');
    expect(fitOn(pair, 'both', [49, 0, 0]).reason?.code).toBe('over-border');
    expect(fitOn(pair, 'both', [0, 0, 9]).reason?.code).toBe('no-slice');
    const bare = fitStent({ centreMm: at(0) }, pair.soft.stack, pair.sharp.stack, storedOf, {
      soft: null,
      sharp: pair.texture.sharp,
    });
    expect(bare.reason?.code).toBe('no-texture');
  });

  it('one click beside the centre finds centre and a radius', () => {
    const truth = stents[0] as TrueStent;
    const found = findStentCentre(
      [truth.centreMm[0] + 0.6, truth.centreMm[1] - 0.5, 0],
      pair.soft.stack,
      storedOf,
    );
    if (!found.ok) throw new Error(found.refusal.text);
    expect(
      Math.hypot(
        found.value.centreMm[0] - truth.centreMm[0],
        found.value.centreMm[1] - truth.centreMm[1],
      ),
    ).toBeLessThan(0.2);
    expect(Math.abs(found.value.radiusMm - 1.8)).toBeLessThan(0.6);
  });

  it('a profile across the same stent sees struts on the sharp kernel and narrows the lumen', () => {
    const [x, y] = (stents[0] as TrueStent).centreMm;
    const value = measureProfile(
      { fromMm: [x - 4, y, 0], toMm: [x + 4, y, 0], bandMm: 0.8, nominalMm: 3 },
      pair.sharp.stack,
      (slice) => pair.sharp.stored[slice],
    );
    expect(value.kind).toBe('stent');
    expect(Math.abs((value.peakDistanceMm ?? 0) - 3.1)).toBeLessThan(0.35);
    expect(value.narrowing).toBeGreaterThan(0.05);
    expect(value.narrowing).toBeLessThan(0.6);
  });

  it('profiles take a plain lumen for a lumen on both kernels, and stents for stents on the sharp one', () => {
    const kindsOf = (side: 'soft' | 'sharp', index: number) => {
      const [x, y] = (stents[index] as TrueStent).centreMm;
      return Array.from({ length: 12 }, (_, turn) => {
        const [c, s] = [Math.cos((turn * Math.PI) / 12), Math.sin((turn * Math.PI) / 12)];
        const line = {
          fromMm: [x - 4 * c, y - 4 * s, 0] as const,
          toMm: [x + 4 * c, y + 4 * s, 0] as const,
          bandMm: 0.8,
        };
        const stored = (slice: number) => pair[side].stored[slice];
        return measureProfile(line, pair[side].stack, stored, pair.texture[side] ?? undefined).kind;
      });
    };
    const lumens = [...kindsOf('soft', 4), ...kindsOf('sharp', 4)];
    expect(lumens.filter((kind) => kind === 'lumen').length).toBeGreaterThanOrEqual(23);
    const struts = [0, 5, 6].flatMap((index) => kindsOf('sharp', index));
    expect(struts).toHaveLength(36);
    expect(struts.filter((kind) => kind === 'stent').length).toBeGreaterThanOrEqual(34);
  });
});

/** What is left over is noise: no more than the kernel's own around the stent, and no hill or hollow. */
function checkResiduals({ kernels }: StentFit): void {
  for (const { residual, noiseSdHu } of kernels) {
    const { hu, columns, rows } = residual;
    expect(hu.length).toBe(columns * rows);
    const mean = hu.reduce((sum, value) => sum + value, 0) / hu.length;
    const sd = Math.sqrt(hu.reduce((sum, value) => sum + (value - mean) ** 2, 0) / hu.length);
    expect(Math.abs(mean)).toBeLessThan(noiseSdHu);
    expect(sd).toBeLessThan(1.5 * noiseSdHu);
  }
}
