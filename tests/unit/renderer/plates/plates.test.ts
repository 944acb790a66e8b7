import { describe, expect, it } from 'vitest';
import { directionLetters, orientationLetters, scaleBar } from '../../../../core/geometry/index.js';
import { displayTable } from '../../../../core/intensity/index.js';
import { greyTable, mapGreys } from '../../../../renderer/plates/greyTables.js';
import {
  fitScale,
  patientToPlate,
  pixelToPlate,
  plateToPatient,
  plateTransform,
} from '../../../../renderer/plates/plateTransform.js';
import { positionText } from '../../../../renderer/plates/positionText.js';
import { sampleStack } from '../sample.js';

const axialGrid = sampleStack().slices[0].image.grid;

describe('The letters around a plate', () => {
  // PS3.3 C.7.6.2.1.1: x grows to the left hand, y to the back, z to the head. Letters as in C.7.6.1.1.1.
  it('are R, L, A and P on an axial slice', () => {
    expect(orientationLetters(axialGrid)).toEqual({ left: 'R', right: 'L', top: 'A', bottom: 'P' });
  });

  it('are A, P, H and F on a sagittal slice', () => {
    const grid = { ...axialGrid, rowDirection: [0, 1, 0], columnDirection: [0, 0, -1] } as const;
    expect(orientationLetters(grid)).toEqual({ left: 'A', right: 'P', top: 'H', bottom: 'F' });
  });

  it('name the larger component first on an oblique slice', () => {
    expect(directionLetters([0.6, 0.8, 0])).toBe('PL');
    expect(directionLetters([-0.36, 0.48, 0.8])).toBe('HPR');
  });

  it('leave out a component of less than a degree', () => {
    expect(directionLetters([0.99995, 0.01, 0])).toBe('L');
  });
});

describe('The scale bar', () => {
  it('is the longest round length that fits', () => {
    expect(scaleBar(2, 130)).toEqual({ lengthMm: 50, lengthPx: 100 });
    expect(scaleBar(6.5, 130)).toEqual({ lengthMm: 20, lengthPx: 130 });
    expect(scaleBar(100, 130)).toEqual({ lengthMm: 1, lengthPx: 100 });
    expect(scaleBar(200, 130)).toEqual({ lengthMm: 0.5, lengthPx: 100 });
  });

  it('is none without a scale or without room', () => {
    expect(scaleBar(0, 130)).toBeUndefined();
    expect(scaleBar(2, 0)).toBeUndefined();
  });
});

describe('A slice on a plate', () => {
  const size = { widthPx: 400, heightPx: 300 };
  const grid = { ...axialGrid, pixelSpacingMm: [0.5, 0.25] as const };
  const transform = plateTransform(grid, size, [-5, -10, 0], 20);

  it('has its centre in the middle of the plate', () => {
    expect(patientToPlate(transform, [-5, -10, 0])).toEqual({ x: 200, y: 150 });
  });

  it('keeps the spacing of rows and columns apart', () => {
    // Column 20 and row 20 lie at the centre; one pixel further is 0.25 mm to the right, 0.5 mm down.
    expect(pixelToPlate(transform, { column: 21, row: 21 })).toEqual({ x: 205, y: 160 });
  });

  it('gives back the place of the patient', () => {
    expect(plateToPatient(transform, { x: 220, y: 140 })).toEqual([-4, -10.5, 0]);
  });

  it('fits when its longer side fits, and not at all on a plate without size', () => {
    expect(fitScale(grid, { widthPx: 400, heightPx: 400 })).toBe(20);
    expect(fitScale(grid, { widthPx: 0, heightPx: 0 })).toBeUndefined();
  });
});

describe('The position text', () => {
  it('names the axis of an axial stack', () => {
    expect(positionText(axialGrid, 10)).toBe('z 10.0 mm');
  });

  it('turns the sign where the normal points to the feet', () => {
    expect(positionText({ ...axialGrid, columnDirection: [0, -1, 0] }, -10)).toBe('z 10.0 mm');
  });

  it('names no axis on an oblique stack', () => {
    const grid = { ...axialGrid, columnDirection: [0, 0.8, 0.6] } as const;
    expect(positionText(grid, 10)).toBe('10.0 mm along the stack');
  });
});

describe('The greys of a slice', () => {
  const { pixels } = sampleStack().slices[0].image;
  const window = { centre: 40, width: 400, function: 'LINEAR' } as const;

  it('are those of the display table, opaque, for negative stored values too', () => {
    const table = greyTable(pixels, window);
    const levels = displayTable(pixels, window);
    const target = new Uint32Array(4);
    mapGreys(Int16Array.from([-1024, -1, 40, 3000]), table, target);
    const expected = [-1024, -1, 40, 3000].map((stored) => {
      const level = levels[stored & 0xffff] ?? -1;
      return (0xff000000 | (level << 16) | (level << 8) | level) >>> 0;
    });
    expect([...target]).toEqual(expected);
    // PS3.3 C.11.2.1.2.1 by hand: −1 → ((−1 − 39.5) / 399 + 0.5) · 255 = 101.6, 40 → 127.8.
    expect([...target].map((word) => word & 0xff)).toEqual([0, 102, 128, 255]);
  });

  it('are the same table for the same rescale and window', () => {
    expect(greyTable({ ...pixels }, { ...window })).toBe(greyTable(pixels, window));
  });
});
