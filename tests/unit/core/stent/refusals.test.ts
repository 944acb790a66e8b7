import { describe, expect, it } from 'vitest';
import { type Evidence, refusalOf } from '../../../../core/stent/index.js';
import { PARAMETERS, type StentParameters } from '../../../../core/stent/stentModel.js';

const STENT: StentParameters = {
  radiusMm: 1.6,
  wallWidthMm: 0.5,
  blurSigmaMm: 0.2,
  lumenHu: 320,
  massHuMm: 450,
  wallHu: 60,
  fatHu: -90,
  levelHu: 0,
};

/** A fit that nothing speaks against, but for what is given. */
function evidence({
  stent = {},
  errors = {},
  drift = [0, 0],
  off = 0,
  meanSquares = 20,
  sectorHu = 10,
  softLocalSdHu = 18,
}: {
  readonly stent?: Partial<StentParameters>;
  readonly errors?: Partial<StentParameters>;
  readonly drift?: readonly [number, number];
  readonly off?: number;
  readonly meanSquares?: number;
  readonly sectorHu?: number;
  readonly softLocalSdHu?: number;
}): Evidence {
  const parameters = { ...STENT, ...stent };
  const usual: Partial<StentParameters> = { radiusMm: 0.01, lumenHu: 12, massHuMm: 15 };
  const covariance = PARAMETERS.map((name, row) =>
    Float64Array.from(PARAMETERS, (_, column) =>
      row === column ? (errors[name] ?? usual[name] ?? 1) ** 2 : 0,
    ),
  );
  return {
    found: {
      axis: { centre: [0, 0], drift },
      annuli: [],
      centres: [
        { zMm: 0, at: [0, 0], errorMm: 0.02 },
        { zMm: 0.5, at: [0.5 * drift[0] + off, 0.5 * drift[1]], errorMm: 0.02 },
      ],
      round: {
        parameters,
        point: Float64Array.from(PARAMETERS, (name) => parameters[name]),
        squares: meanSquares,
        covariance,
        steps: 9,
        meanSquares,
        lower: Array.from({ length: 28 }, () => new Float64Array(28)),
      },
    },
    sectors: [{ angleDeg: 0, fromMm: 2.1, toMm: 2.8, meanHu: sectorHu }],
    softSdHu: 18,
    softLocalSdHu,
  };
}

describe('refusalOf', () => {
  it('has nothing against a fit that explains the images', () => {
    expect(refusalOf(evidence({}))).toBeUndefined();
  });

  it.each([
    ['something on one side', { sectorHu: 80 }, 'surroundings'],
    [
      'surroundings that vary twice as much as uniform areas',
      { softLocalSdHu: 36 },
      'surroundings',
    ],
    ['no ring', { stent: { massHuMm: 90 } }, 'no-ring'],
    ['a ring within its errors', { errors: { massHuMm: 100 } }, 'no-ring'],
    // tan 27° = 0.5095.
    ['a tilt of 27°', { drift: [0.5095, 0] as const }, 'oblique'],
    ['a radius on its border', { stent: { radiusMm: 2.6 } }, 'on-bound'],
    ['struts that hardly any blur has reached', { stent: { blurSigmaMm: 0.08 } }, 'not-linear'],
    ['a lumen of metal', { stent: { lumenHu: 900 } }, 'filling'],
    ['a bend', { off: 0.2 }, 'bent'],
    ['structure that is left over', { meanSquares: 300 }, 'structure'],
    ['a diameter known to 0.2 mm', { errors: { radiusMm: 0.1 } }, 'uncertain'],
    ['a lumen known to 40 HU', { errors: { lumenHu: 40 } }, 'uncertain'],
  ])('gives no value for %s', (_, change, code) => {
    expect(refusalOf(evidence(change))?.code).toBe(code);
  });
});
