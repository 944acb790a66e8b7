import { describe, expect, it } from 'vitest';
import { followPosition } from '../../../../renderer/link/follow.js';
import { followCentre } from '../../../../renderer/link/followView.js';
import { positionIn, sliceIndexAt } from '../../../../renderer/link/slicePosition.js';
import { scrollBy, scrollTo, toggleLink } from '../../../../renderer/state/changes/view.js';
import { shownSlice } from '../../../../renderer/state/selectors.js';
import { axial, sampleStack, sampleState } from '../sample.js';

const shown = (state: Parameters<typeof shownSlice>[0]) =>
  (['soft', 'sharp'] as const).map((kernel) => shownSlice(state, kernel)?.index);

describe('The slice at a position', () => {
  const stack = sampleStack({ positionsMm: axial(5, 1) });

  it('is the nearest one within half the spacing', () => {
    expect(sliceIndexAt(stack, 2.4)).toBe(2);
    expect(sliceIndexAt(stack, 2.6)).toBe(3);
  });

  it('reaches half a spacing beyond the last slice, and no further', () => {
    expect(sliceIndexAt(stack, 4.5)).toBe(4);
    expect(sliceIndexAt(stack, 4.51)).toBeUndefined();
    expect(sliceIndexAt(stack, -0.51)).toBeUndefined();
  });

  it('is none in a gap', () => {
    const [a, b, c] = axial(5, 1);
    const last = axial(1, 1, 6)[0];
    if (!a || !b || !c || !last) throw new Error('invalid sample');
    const gap = sampleStack({ positionsMm: [a, b, c, last], sliceSpacingMm: 1 });
    expect(sliceIndexAt(gap, 4)).toBeUndefined();
    expect(sliceIndexAt(gap, 5.6)).toBe(3);
  });
});

describe('Linked scrolling', () => {
  it('goes by position in mm and not by number', () => {
    const sharp = sampleStack({ series: '2.25.88001.3', positionsMm: axial(9, 0.5, 1) });
    const state = scrollTo('soft', 3)(sampleState({ sharp }));
    expect(shown(state)).toEqual([3, 4]);
  });

  it('shows no slice where the other stack has none, and is in step again when it comes back', () => {
    const sharp = sampleStack({ series: '2.25.88001.3', positionsMm: axial(2, 1, 3) });
    const state = sampleState({ sharp, z: 1 });
    expect(shown(state)).toEqual([1, undefined]);
    expect(shown(scrollBy('soft', 2)(state))).toEqual([3, 0]);
  });

  it('stops at the ends of the stack that is scrolled', () => {
    expect(shown(scrollBy('soft', 99)(sampleState()))).toEqual([4, 4]);
    expect(shown(scrollBy('soft', -99)(sampleState()))).toEqual([0, 0]);
  });

  it('follows a tilted pair along its common normal, whatever the shift of its slices', () => {
    // Direction cosines of a plane tilted by asin(0.6) about x: the slices are sheared along z.
    const tilted = (series: string, z: number) =>
      sampleStack({
        series,
        rowDirection: [1, 0, 0],
        columnDirection: [0, 0.8, 0.6],
        positionsMm: [0, 1, 2, 3].map((step) => [-10, -20, z + step * 1.25] as const),
      });
    const soft = tilted('2.25.88001.2', 0);
    const sharp = tilted('2.25.88001.3', 1.25);
    // 1.25 mm along z are 1 mm along the normal.
    expect(soft.sliceSpacingMm).toBeCloseTo(1, 9);
    const state = scrollTo('soft', soft.slices[2]?.alongMm ?? 0)(sampleState({ soft, sharp }));
    expect(shown(state)).toEqual([2, 1]);
  });

  it('finds no place in a stack that is not parallel', () => {
    const soft = sampleStack();
    const leaning = sampleStack({ series: '2.25.88001.3', columnDirection: [0, 0.8, 0.6] });
    expect(positionIn(soft, 2, leaning)).toBeUndefined();
    expect(shown(sampleState({ soft, sharp: leaning }))).toEqual([2, undefined]);
  });

  it('turns the sign for a stack whose normal points the other way', () => {
    const turned = sampleStack({ series: '2.25.88001.3', columnDirection: [0, -1, 0] });
    expect(positionIn(sampleStack(), 2, turned)).toBe(-2);
  });

  it('goes by number when positions can’t be compared, and beyond a shorter stack shows no slice', () => {
    const soft = sampleStack();
    const sharp = sampleStack({ series: '2.25.88001.3', positionsMm: axial(3, 2, 500) });
    expect(followPosition('index', soft, 2, sharp)).toBe(504);
    expect(followPosition('index', soft, 4, sharp)).toBe(508);
    const state = sampleState({ soft, sharp, link: 'index', z: 4 });
    expect(shown(state)).toEqual([4, undefined]);
    expect(shown(scrollBy('soft', -2)(state))).toEqual([2, 2]);
  });

  it('leaves the other plate alone when it is unlinked, and fetches it when it is linked again', () => {
    const unlinked = toggleLink('scroll')(sampleState());
    const apart = scrollBy('soft', 2)(unlinked);
    expect(shown(apart)).toEqual([4, 2]);
    expect(shown(toggleLink('scroll')(apart))).toEqual([4, 4]);
  });
});

describe('The linked view', () => {
  const { grid } = sampleStack().slices[0].image;
  const far = sampleStack({ positionsMm: axial(1, 1, 700) }).slices[0].image.grid;

  it('has the same place of the patient in the middle', () => {
    expect(followCentre('position', grid, [3, -4, 2], far)).toEqual([3, -4, 2]);
  });

  it('has the same distance from the slice’s middle when positions can’t be compared', () => {
    const moved = { ...far, positionMm: [90, 80, 700] as const };
    // Middle of the first slice: (−0.25, −10.25); of the second: (99.75, 89.75).
    expect(followCentre('index', grid, [2.75, -9.25, 0], moved)).toEqual([102.75, 90.75, 700]);
  });
});
