import { describe, expect, it } from 'vitest';
import type { Stack } from '../../../../core/stack/index.js';
import { pairOf } from '../../../../renderer/services/pairOf.js';
import { sampleStack } from '../sample.js';

const inFrame = (stack: Stack, frameOfReferenceUid: string): Stack => {
  const [first, ...rest] = stack.slices.map((slice) => ({
    ...slice,
    image: {
      ...slice.image,
      acquisition: { ...slice.image.acquisition, frameOfReferenceUid },
    },
  }));
  if (first === undefined) throw new Error('invalid sample: no slices');
  return { ...stack, slices: [first, ...rest] };
};

const soft = inFrame(sampleStack({ series: '2.25.6.1' }), '2.25.6.8');
const sharp = inFrame(sampleStack({ series: '2.25.6.2' }), '2.25.6.8');
const elsewhere = inFrame(sampleStack({ series: '2.25.6.3' }), '2.25.6.9');

describe('The pair of two stacks', () => {
  it('is linked by position in one frame of reference', () => {
    expect(pairOf({ soft, sharp }, 'reader')).toMatchObject({
      ok: true,
      value: { link: 'position', overrides: [], chosenBy: 'reader' },
    });
  });

  it('is refused across frames of reference without a reason', () => {
    expect(pairOf({ soft, sharp: elsewhere }, 'reader')).toMatchObject({
      ok: false,
      refusal: { code: 'needs-reason' },
    });
  });

  it('is linked by slice number where the reader answers for the frame of reference', () => {
    const overrides = [{ check: 'frame of reference', reason: 'one scan, renamed' }] as const;
    expect(pairOf({ soft, sharp: elsewhere, overrides }, 'reader')).toMatchObject({
      ok: true,
      value: { link: 'index', overrides },
    });
  });
});
