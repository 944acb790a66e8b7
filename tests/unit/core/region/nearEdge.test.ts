import { describe, expect, it } from 'vitest';
import type { StoredValues } from '../../../../core/dicom/index.js';
import type { KernelTexture } from '../../../../core/quality/index.js';
import {
  edgeLevels,
  edgesNear,
  edgesNearOn,
  FEW_PIXELS,
  FLAGS,
  isQuiet,
  measureRegion,
  type Shape,
  type StackBeside,
  smallestWidthMm,
} from '../../../../core/region/index.js';
import type { Stack } from '../../../../core/stack/index.js';
import { countEdges, EDGE_RECIPES } from '../../../bench/evidence/edgeReport.js';
import { type ImageSlice, imageStack } from '../../../bench/evidence/imageStack.js';

/** Pixels of 0.25 mm, first pixel at −16 + 0.125 mm: 128 × 128. */
const GRID = { centreMm: [0, 0], fieldOfViewMm: 32, matrix: 128 } as const;
const BLUR_MM = 1;

/** The noise of a quiet kernel with a blur of 1 mm; enhanced blood of 350 HU was among its even areas. */
const TEXTURE: KernelTexture = {
  noiseSdHu: 10,
  areas: 4,
  frequencyPerMm: [0.02, 0.1, 0.2, 0.3, 0.4],
  powerHu2Mm2: [100, 100, 80, 40, 10],
  meanPerMm: 0.2,
  peakPerMm: 0.1,
  riseMm: 1.0885,
  blurFwhmMm: BLUR_MM,
  places: [
    { centreMm: [20, 0, 0], sdHu: 10, meanHu: 350 },
    { centreMm: [0, 20, 0], sdHu: 10, meanHu: 60 },
  ],
};

/** Error function, Abramowitz & Stegun 1964, 7.1.26: within 1.5e−7. */
function erf(x: number): number {
  const t = 1 / (1 + 0.3275911 * Math.abs(x));
  const sum =
    t *
    (0.254829592 + t * (-0.284496736 + t * (1.421413741 + t * (-1.453152027 + t * 1.061405429))));
  return Math.sign(x) * (1 - sum * Math.exp(-x * x));
}

const SIGMA_MM = BLUR_MM / 2.354820045;
/** A straight edge at 0 through a Gaussian blur of 1 mm: 0 on the left, 1 on the right. */
const step = (x: number): number => (1 + erf(x / (SIGMA_MM * Math.SQRT2))) / 2;
/** A thin line at 0 of mass 1 HU·mm through the same blur. */
const line = (x: number): number =>
  Math.exp((-x * x) / (2 * SIGMA_MM * SIGMA_MM)) / (SIGMA_MM * Math.sqrt(2 * Math.PI));

function stackOf(huAt: (x: number, y: number) => number, zMm = [0]): StackBeside {
  const hu = Float64Array.from({ length: 128 * 128 }, (_, index) =>
    huAt(-15.875 + (index % 128) * 0.25, -15.875 + Math.floor(index / 128) * 0.25),
  );
  const slices = zMm.map((z): ImageSlice => ({ zMm: z, hu }));
  const { stack, stored } = imageStack('one', GRID, slices);
  return { stack, storedOf: (index) => stored[index], noise: TEXTURE };
}

const disc = (x: number, y: number, radius: number, z = 0): Shape => ({
  kind: 'ellipse',
  centreMm: [x, y, z],
  radiiMm: [radius, radius],
});

const found = (shape: Shape, on: StackBeside) =>
  edgesNearOn(shape, on)?.edges.map(({ kind, distanceMm }) => [
    kind,
    Math.round(distanceMm * 100) / 100,
  ]);

describe('A strong edge close to a region', () => {
  it('is a large grain of calcium at the distance of its true border, which blur leaves at half height', () => {
    // 1000 HU beyond x = 5, lumen before.
    const stack = stackOf((x, y) => 350 + 650 * step(x - 5) * step(3 - Math.abs(y)));
    const [first] = edgesNearOn(disc(2, 0, 2.2), stack)?.edges ?? [];
    expect(first?.kind).toBe('calcium');
    expect(Math.abs((first?.distanceMm ?? 0) - 0.8)).toBeLessThan(0.1);
  });

  it('is a thin ring of a strut, within half a blur of its place', () => {
    // 350 HU·mm on a circle of 3 mm around lumen, fat outside: the crest of the sum lies at 2.77 mm, not at 3.
    const stack = stackOf((x, y) => {
      const out = Math.hypot(x, y) - 3;
      return -90 + 440 * step(-out) + 350 * line(out);
    });
    const [first] = edgesNearOn(disc(0, 0, 2.2), stack)?.edges ?? [];
    expect(first?.kind).toBe('strut');
    expect(Math.abs((first?.distanceMm ?? 0) - 0.8)).toBeLessThan(0.5);
  });

  it('is 0 mm away when a strut crosses the region', () => {
    const stack = stackOf((x, y) => 350 + 600 * line(x - 1) * step(8 - Math.abs(y)));
    expect(found(disc(0, 0, 2), stack)).toEqual([['strut', 0]]);
  });

  it('is not there two blurs away', () => {
    const calcium = stackOf((x, y) => 350 + 650 * step(x - 5) * step(3 - Math.abs(y)));
    expect(found(disc(1, 0, 2), calcium)).toEqual([]);
    const strut = stackOf((x, y) => 350 + 600 * line(x - 5) * step(8 - Math.abs(y)));
    expect(found(disc(1, 0, 2), strut)).toEqual([]);
  });

  it('is air, but never for a region in air', () => {
    const lung = stackOf((x) => 60 - 900 * step(x - 5));
    expect(found(disc(2, 0, 2.5), lung)?.[0]?.[0]).toBe('air');
    expect(found(disc(1, 0, 2), lung)).toEqual([]);
    expect(found(disc(9, 0, 3), lung)).toEqual([]);
  });

  it('is never that of lumen to wall, fat or muscle', () => {
    const vessel = stackOf((x, y) => -90 + 440 * step(2 - Math.hypot(x, y)));
    expect(found(disc(0, 0, 1.5), vessel)).toEqual([]);
    expect(found(disc(2.5, 0, 1), vessel)).toEqual([]);
  });

  it('is never made by padding', () => {
    const on = stackOf((x) => (x > 4 ? -1024 : 60));
    const stack: Stack = {
      ...on.stack,
      slices: on.stack.slices.map((slice) => ({
        ...slice,
        image: {
          ...slice.image,
          pixels: { ...slice.image.pixels, padding: { low: -10, high: 10 } },
        },
      })) as unknown as Stack['slices'],
    };
    expect(found(disc(2, 0, 2), { ...on, stack })).toEqual([]);
    expect(found(disc(2, 0, 2), on)?.[0]?.[0]).toBe('air');
  });

  it('is found alike where pixels are twice as high as wide', () => {
    const hu = (x: number, y: number) => 350 + 650 * step(y - 5) * step(3 - Math.abs(x));
    const on = stackOf((x, y) => hu(x, 2 * y));
    const stack: Stack = {
      ...on.stack,
      slices: on.stack.slices.map((slice) => {
        const { grid } = slice.image;
        const high = {
          ...grid,
          pixelSpacingMm: [0.5, 0.25] as const,
          positionMm: [-15.875, -31.75, 0] as const,
        };
        return { ...slice, image: { ...slice.image, grid: high } };
      }) as unknown as Stack['slices'],
    };
    const [first] = edgesNearOn(disc(0, 2, 2.2), { ...on, stack })?.edges ?? [];
    expect(first?.kind).toBe('calcium');
    expect(Math.abs((first?.distanceMm ?? 0) - 0.8)).toBeLessThan(0.15);
  });

  it('has its pixels, ascending, all of them above the lumen', () => {
    const on = stackOf((x, y) => 350 + 650 * step(x - 5) * step(3 - Math.abs(y)));
    const stored = on.storedOf(0) as StoredValues;
    const pixels = [...(edgesNearOn(disc(2, 0, 2.2), on)?.edges[0]?.pixels ?? [])];
    expect(pixels.length).toBeGreaterThan(100);
    expect(pixels).toEqual([...pixels].sort((a, b) => a - b));
    expect(pixels.every((pixel) => (stored[pixel] ?? 0) - 1024 > 390)).toBe(true);
  });

  it('is looked for on the sharper of two stacks, and near is one blur of the kernel measured on', () => {
    const sharp = stackOf((x, y) => 350 + 650 * step(x - 5) * step(3 - Math.abs(y)));
    const soft: StackBeside = {
      ...stackOf(() => 350),
      noise: { ...TEXTURE, blurFwhmMm: 2 },
    };
    const region = disc(1, 0, 2.2);
    expect(edgesNearOn(region, soft)?.edges).toEqual([]);
    const both = edgesNearOn(region, soft, sharp);
    expect(both?.withinMm).toBe(2);
    expect(both?.edges.map(({ kind }) => kind)).toEqual(['calcium']);
    // The sharper kernel is not asked about the softer.
    expect(edgesNearOn(region, sharp, soft)?.edges).toEqual([]);
  });

  it('is not guessed where the blur or the level of blood is not known', () => {
    const on = stackOf(() => 350);
    const slice = on.stack.slices[0];
    const stored = on.storedOf(0) as StoredValues;
    const asked = (noise: StackBeside['noise']) =>
      edgesNear(disc(0, 0, 2), { slice, stored, noise }, 350);
    expect(asked(TEXTURE)?.edges).toEqual([]);
    expect(asked({ ...TEXTURE, blurFwhmMm: null })).toBeUndefined();
    expect(asked({ ...TEXTURE, places: undefined })).toBeUndefined();
    expect(asked(FLAGS.noStandardErrorAlone)).toBeUndefined();
  });
});

describe('The levels of strong edges', () => {
  it('start from the brightest even area within 60 mm', () => {
    const far = { centreMm: [100, 0, 0], sdHu: 10, meanHu: 600 } as const;
    const texture = { ...TEXTURE, places: [...(TEXTURE.places ?? []), far] };
    expect(edgeLevels(texture, [0, 0, 0], [0.25, 0.25])?.lumenHu).toBe(350);
    expect(edgeLevels(texture, [90, 0, 0], [0.25, 0.25])?.lumenHu).toBe(600);
    expect(edgeLevels(texture, [-300, 0, 0], [0.25, 0.25])?.lumenHu).toBe(600);
  });

  it('rise with the noise', () => {
    const quiet = edgeLevels(TEXTURE, [0, 0, 0], [0.25, 0.25]);
    const places = TEXTURE.places?.map((place) => ({ ...place, sdHu: 60 }));
    const noisy = edgeLevels({ ...TEXTURE, noiseSdHu: 60, places }, [0, 0, 0], [0.25, 0.25]);
    expect(noisy?.peakHu).toBeGreaterThan((quiet?.peakHu ?? 0) + 100);
  });
});

describe('The flags of a region', () => {
  const flat = stackOf((x, y) => 350 + Math.sin(7 * x + 3 * y), [0, 1]);
  const codes = (shape: Shape, beside?: StackBeside) =>
    measureRegion(shape, flat.stack, flat.storedOf, flat.noise, beside).flags.map(
      ({ code }) => code,
    );

  it('are none for a wide region on an even slice', () => {
    expect(codes(disc(0, 0, 3))).toEqual([]);
  });

  it('tell of fewer than 12 pixels, whose SD is uncertain by 1/√22 = 21 %', () => {
    expect(FEW_PIXELS).toBe(12);
    expect(codes(disc(-0.125, -0.125, 0.4))).toEqual(['few-pixels', 'below-two-blurs']);
    expect(codes(disc(-0.125, -0.125, 0.51))).toEqual(['below-two-blurs']);
  });

  it('tell of a width of less than two blurs', () => {
    expect(codes(disc(0, 0, 0.99))).toEqual(['below-two-blurs']);
    expect(codes(disc(0, 0, 1.01))).toEqual([]);
    const slab: Shape = {
      kind: 'outline',
      pointsMm: [
        [-4, -0.9, 0],
        [4, -0.9, 0],
        [4, 0.9, 0],
        [-4, 0.9, 0],
      ],
    };
    expect(smallestWidthMm(slab, flat.stack.slices[0].image.grid)).toBeCloseTo(1.8, 10);
    expect(codes(slab)).toEqual(['below-two-blurs']);
  });

  it('tell of a slice that lies more than a quarter of the spacing away', () => {
    expect(codes(disc(0, 0, 3, 0.25))).toEqual([]);
    expect(codes(disc(0, 0, 3, 0.3))).toEqual(['slice-apart']);
  });

  it('tell of a place that the other stack does not show, in its plane or along the stack', () => {
    const small = imageStack('small', { ...GRID, fieldOfViewMm: 8 }, [
      { zMm: 0, hu: new Float64Array(128 * 128).fill(350) },
    ]);
    const beside: StackBeside = {
      stack: small.stack,
      storedOf: (index) => small.stored[index],
      noise: TEXTURE,
    };
    expect(codes(disc(0, 0, 3), beside)).toEqual([]);
    expect(codes(disc(2, 0, 3), beside)).toEqual(['beyond-shared-field']);
    expect(codes(disc(0, 0, 3, 1), beside)).toEqual(['beyond-shared-field']);
  });

  it('name a strong edge and how far it is', () => {
    const on = stackOf((x, y) => 350 + 650 * step(x - 5) * step(3 - Math.abs(y)));
    const { flags } = measureRegion(disc(2, 0, 2.2), on.stack, on.storedOf, on.noise);
    expect(flags).toEqual([
      {
        code: 'near-calcium',
        text: 'Calcium or bone is about 0.8 mm away, within this kernel’s blur (1.00 mm): the mean is not of this tissue alone. Move the region away or make it smaller.',
      },
    ]);
  });

  it('say quietly that edges were not looked for', () => {
    const { flags } = measureRegion(disc(0, 0, 3), flat.stack, flat.storedOf);
    expect(flags.map(({ code }) => code)).toEqual(['no-standard-error', 'edges-not-sought']);
    expect(flags.every(isQuiet)).toBe(true);
  });
});

describe('On noisy phantoms', () => {
  it('all regions within one blur of a strut or calcium are flagged, and none two blurs away', {
    timeout: 60_000,
  }, async () => {
    for (const recipe of [EDGE_RECIPES[0], EDGE_RECIPES[3]]) {
      if (recipe === undefined) throw new Error('no recipe');
      const { soft, sharp } = await countEdges(recipe, 15);
      for (const side of [soft, sharp]) {
        expect(side['within one blur']).toMatchObject({ placed: 15, flagged: 15 });
        expect(side['two blurs away']).toMatchObject({ placed: 15, flagged: 0 });
        expect(side.farther).toMatchObject({ placed: 15, flagged: 0 });
      }
    }
  });
});
