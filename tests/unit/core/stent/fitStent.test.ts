import { describe, expect, it } from 'vitest';
import type { KernelTexture } from '../../../../core/quality/index.js';
import type { Stack } from '../../../../core/stack/index.js';
import { findStentCentre, fitStent } from '../../../../core/stent/index.js';
import { axial, sampleStack } from '../../renderer/sample.js';

const SIZE = 60;
const stack = sampleStack({ positionsMm: axial(3, 0.5), rows: SIZE, columns: SIZE });
/** A bright disc of 1.5 mm around the middle of 60 × 60 pixels of 0.5 mm. */
const MIDDLE = [4.75, -5.25] as const;
const disc = Int16Array.from({ length: SIZE * SIZE }, (_, index) => {
  const x = -10 + (index % SIZE) * 0.5;
  const y = -20 + Math.floor(index / SIZE) * 0.5;
  return Math.hypot(x - MIDDLE[0], y - MIDDLE[1]) < 1.5 ? 400 : -80;
});

/** Noise as filtered back projection makes it: c²·f·W², W a Hann window (Harris 1978, doi 10.1109/PROC.1978.10837). */
function texture(endPerMm: number): KernelTexture {
  const frequencyPerMm = Array.from({ length: 12 }, (_, ring) => 0.08 * (ring + 1));
  return {
    noiseSdHu: 20,
    areas: 60,
    frequencyPerMm,
    powerHu2Mm2: frequencyPerMm.map((f) =>
      f < endPerMm ? 2500 * f * (0.5 + 0.5 * Math.cos((Math.PI * f) / endPerMm)) ** 2 : 0,
    ),
    meanPerMm: 0.4,
    peakPerMm: 0.4,
    riseMm: null,
    blurFwhmMm: null,
  };
}
const TEXTURE = { soft: texture(0.7), sharp: texture(1.2) };
const at = (z: number) => ({ centreMm: [MIDDLE[0], MIDDLE[1], z] as const });

describe('fitStent', () => {
  const reasonOf = (first: Stack, second: Stack, place = at(0.5)) =>
    fitStent(place, first, second, () => disc, TEXTURE).reason?.code;

  it('gives the reason where stacks have no HU or no spacing', () => {
    expect(reasonOf(stack, sampleStack({ unit: 'US' }))).toBe('not-hu');
    const [first, ...rest] = stack.slices;
    const image = { ...first.image, grid: { ...first.image.grid, unscaled: true as const } };
    const unscaled = { ...stack, slices: [{ ...first, image }, ...rest] as const };
    expect(reasonOf(unscaled, stack)).toBe('no-pixel-spacing');
  });

  it('gives the reason where planes are not parallel', () => {
    const sagittal = sampleStack({
      rowDirection: [0, 1, 0],
      columnDirection: [0, 0, -1],
      rows: SIZE,
      columns: SIZE,
    });
    expect(reasonOf(stack, sagittal)).toBe('not-parallel');
  });

  it('gives the reason where no slice is there, or it can’t be read', () => {
    expect(reasonOf(stack, stack, at(30))).toBe('no-slice');
    const unread = fitStent(at(0.5), stack, stack, () => undefined, TEXTURE);
    expect(unread.reason?.code).toBe('slice-missing');
  });

  it('gives the reason where the noise was not measured or is not that of a linear reconstruction', () => {
    const codeWith = (soft: KernelTexture | null) =>
      fitStent(at(0.5), stack, stack, () => disc, { ...TEXTURE, soft }).reason?.code;
    expect(codeWith(null)).toBe('no-texture');
    const { frequencyPerMm } = TEXTURE.soft;
    const powerHu2Mm2 = frequencyPerMm.map((f) => 900 * Math.exp(-f / 0.1));
    expect(codeWith({ ...TEXTURE.soft, powerHu2Mm2 })).toBe('not-linear');
  });

  it('gives no value for a plain disc', () => {
    expect(reasonOf(stack, stack)).toBeDefined();
  });
});

describe('findStentCentre', () => {
  it('moves from a click 0.8 mm off to the middle of a disc, and proposes its radius', () => {
    const found = findStentCentre([MIDDLE[0] + 0.7, MIDDLE[1] - 0.4, 0.5], stack, () => disc);
    if (!found.ok) throw new Error(found.refusal.text);
    expect(found.value.centreMm[0]).toBeCloseTo(MIDDLE[0], 1);
    expect(found.value.centreMm[1]).toBeCloseTo(MIDDLE[1], 1);
    expect(Math.abs(found.value.radiusMm - 1.5)).toBeLessThan(0.3);
  });

  it('is refused where all is even', () => {
    const even = disc.map(() => 40);
    expect(findStentCentre(at(0.5).centreMm, stack, () => even)).toMatchObject({
      ok: false,
      refusal: { code: 'no-vessel' },
    });
  });
});
