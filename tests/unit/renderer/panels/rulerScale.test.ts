import { describe, expect, it } from 'vitest';
import {
  nextPositionMm,
  rulerLabelsMm,
  rulerScale,
  rulerTicks,
} from '../../../../renderer/panels/rulerScale.js';

const HEIGHT_PX = 228;

function scaleOf(...stacks: readonly (readonly number[])[]) {
  const scale = rulerScale(stacks, HEIGHT_PX);
  if (scale === undefined) throw new Error('no scale');
  return scale;
}

describe('rulerScale', () => {
  it('spans both stacks, the greatest position at the top, 14 px free at both ends', () => {
    const scale = scaleOf([0, 10], [-10, 5]);
    expect([scale.toPx(10), scale.toPx(0), scale.toPx(-10)]).toEqual([14, 114, 214]);
  });
  it('leads back from px to mm and stops at the ends', () => {
    const scale = scaleOf([0, 20]);
    expect(scale.mmAt(114)).toBe(10);
    expect(scale.mmAt(-50)).toBe(20);
    expect(scale.mmAt(500)).toBe(0);
  });
  it('gives a single slice room on both sides, and none at all no scale', () => {
    expect(scaleOf([7]).toPx(7)).toBe(114);
    expect(rulerScale([[], []], HEIGHT_PX)).toBeUndefined();
  });
});

describe('rulerTicks', () => {
  it('draws every slice when there is room, each tenth long', () => {
    const slices = Array.from({ length: 21 }, (_, i) => i);
    const { ticks, stride, gaps } = rulerTicks(slices, scaleOf(slices));
    expect(stride).toBe(1);
    expect(ticks).toHaveLength(21);
    expect(ticks.filter(({ long }) => long).map(({ px }) => px)).toEqual([214, 114, 14]);
    expect(gaps).toEqual([]);
  });
  it('leaves slices out when they would be closer than 3 px', () => {
    const slices = Array.from({ length: 401 }, (_, i) => i * 0.5);
    expect(rulerTicks(slices, scaleOf(slices)).stride).toBe(10);
  });
  it('shows a gap where slices are missing', () => {
    const slices = [0, 1, 2, 5, 6, 7, 8, 9, 10];
    const { gaps } = rulerTicks(slices, scaleOf(slices));
    expect(gaps).toEqual([{ topPx: 114, bottomPx: 174 }]);
  });
  it('takes jitter below half a spacing for no gap', () => {
    const slices = [0, 1, 2.2, 3, 4.3];
    expect(rulerTicks(slices, scaleOf(slices)).gaps).toEqual([]);
  });
});

describe('rulerLabelsMm', () => {
  it('labels round positions inside the span', () => {
    expect(rulerLabelsMm(scaleOf([0, 20]), HEIGHT_PX)).toEqual([0, 5, 10, 15, 20]);
  });
});

describe('nextPositionMm', () => {
  const slices = [0, 0.5, 1, 1.5, 2];
  it('goes to the neighbours from a slice and from between slices', () => {
    expect(nextPositionMm(slices, 1, 1)).toBe(1.5);
    expect(nextPositionMm(slices, 1, -1)).toBe(0.5);
    expect(nextPositionMm(slices, 0.7, 1)).toBe(1);
    expect(nextPositionMm(slices, 0.7, -1)).toBe(0.5);
  });
  it('stops at the ends', () => {
    expect(nextPositionMm(slices, 2, 1)).toBe(2);
    expect(nextPositionMm(slices, 0, -1)).toBe(0);
    expect(nextPositionMm(slices, 1, 10)).toBe(2);
    expect(nextPositionMm(slices, 1, -10)).toBe(0);
  });
  it('has no answer without slices', () => {
    expect(nextPositionMm([], 1, 1)).toBeUndefined();
  });
});
