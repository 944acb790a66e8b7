import { describe, expect, it } from 'vitest';
import { decodeImage } from '../../../../core/dicom/index.js';
import type { KernelTexture } from '../../../../core/quality/index.js';
import { FLAGS, measureRegion, type Shape } from '../../../../core/region/index.js';
import { buildStacks } from '../../../../core/stack/index.js';
import { ctSlice } from '../../../corpus/ctSlice.js';

/** White noise of 10 HU on pixels of 0.5 mm × 0.25 mm: 10²·0.5·0.25 HU²mm² at every frequency. */
const WHITE: KernelTexture = {
  noiseSdHu: 10,
  areas: 8,
  frequencyPerMm: [0.02, 1, 2, 3],
  powerHu2Mm2: [12.5, 12.5, 12.5, 12.5],
  meanPerMm: 1,
  peakPerMm: 1,
  riseMm: null,
  blurFwhmMm: null,
};

describe('measureRegion with the noise of the stack', () => {
  async function measured(shape: Shape, noise?: Parameters<typeof measureRegion>[3]) {
    const padded = { 2621728: { tag: 0x00280120, vr: 'SS', value: 1007 } as const };
    const decoded = await decodeImage(ctSlice({ rows: 9, columns: 9, change: padded }));
    if (!decoded.ok) throw new Error(decoded.refusal.text);
    const { image, stored } = decoded.value;
    const [stack] = buildStacks([{ fileId: 0, file: 'slice', image }]).stacks;
    if (stack === undefined) throw new Error('no stack');
    return measureRegion(shape, stack, () => stored, noise);
  }
  const shape: Shape = { kind: 'ellipse', centreMm: [-9, -18, 0], radiiMm: [0.8, 1.6] };

  it('is SD/√n for noise without correlation, padding left out', async () => {
    const { n, standardErrorHu, flags } = await measured(shape, WHITE);
    expect(n).toBeGreaterThan(20);
    expect(standardErrorHu).toBeCloseTo(10 / Math.sqrt(n), 6);
    expect(flags.map(({ code }) => code)).not.toContain('no-standard-error');
    const overPadding: Shape = { ...shape, centreMm: [-8.25, -20, 0], radiiMm: [0.6, 1] };
    const value = await measured(overPadding, WHITE);
    expect(value.flags.map(({ code }) => code)).toContain('padding-inside');
    expect(value.standardErrorHu).toBeCloseTo(10 / Math.sqrt(value.n), 6);
  });

  it.each([FLAGS.noStandardErrorAlone, FLAGS.noStandardErrorYet, FLAGS.noStandardErrorFewAreas])(
    'is null and says why where it can’t be had',
    async (why) => {
      const { standardErrorHu, flags } = await measured(shape, why);
      expect(standardErrorHu).toBeNull();
      expect(flags).toContainEqual(why);
    },
  );
});
