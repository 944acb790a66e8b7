import { describe, expect, it } from 'vitest';
import {
  clampInto,
  placeWindow,
  type WindowPlace,
  windowPlace,
} from '../../../../app/electron/windowPlace.js';

const LEFT = { id: 1, workArea: { x: 0, y: 25, width: 1920, height: 1055 } };
const RIGHT = { id: 2, workArea: { x: 1920, y: 0, width: 2560, height: 1400 } };
const SMALL = { id: 3, workArea: { x: 0, y: 0, width: 800, height: 500 } };

function remembered(
  x: number,
  y: number,
  width: number,
  height: number,
  displayId = 1,
): WindowPlace {
  return { bounds: { x, y, width, height }, maximised: false, fullScreen: false, displayId };
}

describe('placeWindow', () => {
  it('centres the first window in the primary display’s work area', () => {
    expect(placeWindow(undefined, [LEFT, RIGHT], LEFT)).toEqual({
      bounds: { x: 240, y: 102, width: 1440, height: 900 },
      maximised: false,
      fullScreen: false,
      displayId: 1,
    });
  });

  it('fills a display that is smaller than the first window', () => {
    expect(placeWindow(undefined, [SMALL], SMALL).bounds).toEqual(SMALL.workArea);
  });

  it('returns to where the window was', () => {
    const place = remembered(2000, 100, 1200, 800, 2);
    expect(placeWindow(place, [LEFT, RIGHT], LEFT)).toEqual(place);
  });

  it('moves to the primary display when its own is gone and it overlaps none', () => {
    const place = placeWindow(remembered(2000, 100, 1200, 800, 2), [LEFT], LEFT);
    expect(place).toEqual(remembered(720, 100, 1200, 800, 1));
  });

  it('moves to the display that it overlaps most when its own is gone', () => {
    const place = placeWindow(remembered(1800, 100, 1200, 800, 9), [LEFT, RIGHT], LEFT);
    expect(place).toEqual(remembered(1920, 100, 1200, 800, 2));
  });

  it('brings back a window that is off the screen on each side', () => {
    const inside = (x: number, y: number) =>
      placeWindow(remembered(x, y, 1000, 700), [LEFT], LEFT).bounds;
    expect(inside(-5000, -5000)).toEqual({ x: 0, y: 25, width: 1000, height: 700 });
    expect(inside(5000, 5000)).toEqual({ x: 920, y: 380, width: 1000, height: 700 });
  });

  it('keeps maximised and full screen, with the bounds to go back to', () => {
    const place = { ...remembered(100, 100, 1200, 800), maximised: true, fullScreen: true };
    expect(placeWindow(place, [LEFT], LEFT)).toEqual(place);
  });
});

describe('clampInto', () => {
  it('shrinks a window that is larger than the area', () => {
    expect(clampInto({ x: 0, y: 0, width: 3000, height: 2000 }, LEFT.workArea)).toEqual(
      LEFT.workArea,
    );
  });

  it('grows a window in which nothing could be used', () => {
    expect(clampInto({ x: 10, y: 30, width: 1, height: 1 }, LEFT.workArea)).toEqual({
      x: 10,
      y: 30,
      width: 960,
      height: 620,
    });
  });

  it('never exceeds an area that is smaller than the smallest window', () => {
    expect(clampInto({ x: 0, y: 0, width: 960, height: 620 }, SMALL.workArea)).toEqual(
      SMALL.workArea,
    );
  });
});

describe('windowPlace', () => {
  it.each([
    ['no number', { ...remembered(0, 0, 100, 100), displayId: '1' }],
    ['NaN', remembered(Number.NaN, 0, 100, 100)],
    ['no width', remembered(0, 0, 0, 100)],
    ['beyond any desktop', remembered(1e9, 0, 100, 100)],
    ['another key', { ...remembered(0, 0, 100, 100), extra: 1 }],
  ])('refuses a stored place with %s', (_name, stored) => {
    expect(windowPlace.safeParse(stored).success).toBe(false);
  });
});
