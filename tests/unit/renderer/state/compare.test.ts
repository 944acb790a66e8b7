import { describe, expect, it } from 'vitest';
import {
  holdOther,
  restOn,
  setCompare,
  setFold,
  setRange,
  switchKernel,
} from '../../../../renderer/state/changes/compare.js';
import { scrollTo } from '../../../../renderer/state/changes/view.js';
import {
  alternateKernel,
  compareProblem,
  differenceKernel,
  kernelAt,
} from '../../../../renderer/state/compareSelectors.js';
import { linksOf } from '../../../../renderer/state/selectors.js';
import { sampleStack, sampleState } from '../sample.js';

describe('One plate that shows both kernels', () => {
  it('shows the same place of both, whatever was linked', () => {
    const unlinked = { ...sampleState(), links: { scroll: false, window: false, view: false } };
    const apart = scrollTo('sharp', 4)(unlinked);
    expect([apart.plates.soft.alongMm, apart.plates.sharp.alongMm]).toEqual([2, 4]);
    const folded = setCompare('fold')(apart);
    expect([folded.plates.soft.alongMm, folded.plates.sharp.alongMm]).toEqual([2, 2]);
    expect(linksOf(folded)).toEqual({ scroll: true, window: false, view: true });
    expect(linksOf(setCompare('open')(folded))).toEqual(unlinked.links);
  });

  it('is not to be had for stacks that are turned against each other, and the reader is told', () => {
    const turned = sampleStack({
      series: '2.25.88001.3',
      rowDirection: [0, 1, 0],
      columnDirection: [-1, 0, 0],
    });
    const state = setCompare('fold')(sampleState({ sharp: turned }));
    expect(state.compare.way).toBe('open');
    expect(state.message?.text).toContain('turned against each other');
  });

  it('shows no difference where positions can’t be compared or a stack has no HU', () => {
    expect(compareProblem(sampleState({ link: 'index' }), 'difference')).toContain('Positions');
    expect(compareProblem(sampleState({ link: 'index' }), 'alternate')).toBeUndefined();
    const sharp = sampleStack({ series: '2.25.88001.3', unit: 'stored' });
    expect(compareProblem(sampleState({ sharp }), 'difference')).toContain('HU');
  });
});

describe('The edge of the fold', () => {
  it('parts the plate into soft on its left and sharp on its right', () => {
    const folded = setFold(0.25)(setCompare('fold')(sampleState()));
    // The sample's plates are 400 px wide.
    expect(kernelAt(folded, 'fold', 99)).toBe('soft');
    expect(kernelAt(folded, 'fold', 101)).toBe('sharp');
  });

  it('stays on the plate', () => {
    expect(setFold(1.7)(sampleState()).compare.foldAt).toBe(1);
    expect(setFold(-1)(sampleState()).compare.foldAt).toBe(0);
  });
});

describe('Alternate', () => {
  const alternating = setCompare('alternate')(sampleState());

  it('shows the other kernel while the key is held', () => {
    expect(alternateKernel(alternating)).toBe('soft');
    expect(alternateKernel(holdOther(true)(alternating))).toBe('sharp');
    expect(alternateKernel(holdOther(false)(holdOther(true)(alternating)))).toBe('soft');
  });

  it('rests on the kernel that it was switched to', () => {
    expect(alternateKernel(switchKernel(alternating))).toBe('sharp');
    expect(alternateKernel(restOn('soft')(switchKernel(alternating)))).toBe('soft');
  });

  it('is the only way in which a held key does anything', () => {
    expect(holdOther(true)(sampleState()).compare.held).toBe(false);
  });
});

describe('The difference', () => {
  it('lies on the finer of the two stacks', () => {
    expect(differenceKernel(sampleState())).toBe('soft');
    const sharp = sampleStack({ series: '2.25.88001.3', pixelSpacingMm: [0.3, 0.3] });
    expect(differenceKernel(sampleState({ sharp }))).toBe('sharp');
  });

  it('has a scale of whole HU within bounds', () => {
    expect(setRange(133.4)(sampleState()).compare.rangeHu).toBe(133);
    expect(setRange(1)(sampleState()).compare.rangeHu).toBe(10);
    expect(setRange(9000)(sampleState()).compare.rangeHu).toBe(3000);
  });
});
