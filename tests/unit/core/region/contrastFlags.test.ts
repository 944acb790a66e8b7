import { describe, expect, it } from 'vitest';
import {
  contrastValue,
  FLAGS,
  type Flag,
  type RegionValue,
} from '../../../../core/region/index.js';

const value = (meanHu: number, flags: readonly Flag[]): RegionValue => ({
  n: 20,
  meanHu,
  sdHu: 10,
  minHu: meanHu - 20,
  maxHu: meanHu + 20,
  medianHu: meanHu,
  areaMm2: 5,
  sampledAreaMm2: 5,
  snr: meanHu / 10,
  sliceIndex: 0,
  sliceOffsetMm: 0,
  sopInstanceUid: '2.25.1',
  frameNumber: null,
  standardErrorHu: null,
  placementHu: null,
  flags,
});

describe('A contrast', () => {
  const strut = FLAGS.nearEdge('strut', 0.4, 0.75);
  const narrow = FLAGS.belowTwoBlurs(0.75);

  it('carries the flags of its regions, each once, with the regions that it holds for', () => {
    const lumen = value(350, [FLAGS.noStandardError, narrow, strut]);
    const wall = value(60, [narrow]);
    expect(contrastValue({ lumen, wall, noise: 'wall' })).toEqual({
      value: 29,
      flags: [
        { code: 'below-two-blurs', text: `Lumen and wall: ${narrow.text}` },
        { code: 'near-strut', text: `Lumen: ${strut.text}` },
      ],
    });
  });

  it('carries those of the reference only where that is its noise', () => {
    const [lumen, wall] = [value(350, []), value(60, [])];
    const reference = value(370, [FLAGS.fewPixels(7)]);
    expect(contrastValue({ lumen, wall, reference, noise: 'pooled' }).flags).toEqual([]);
    expect(
      contrastValue({ lumen, wall, reference, noise: 'reference' }).flags.map(({ text }) => text),
    ).toEqual([`Reference: ${FLAGS.fewPixels(7).text}`]);
  });

  it('says of a lossy image that its noise is not the scanner’s, in its own words', () => {
    const [lumen, wall] = [value(350, [FLAGS.lossy]), value(60, [FLAGS.lossy])];
    const { flags } = contrastValue({ lumen, wall, noise: 'wall' });
    expect(flags.map(({ code }) => code)).toEqual(['lossy']);
  });
});
