import { describe, expect, it } from 'vitest';
import { patientToPixel, type SliceGrid, type Vec3 } from '../../../../../core/geometry/index.js';
import { graphicOf } from '../../../../../core/report/sr/imageRegion.js';

function placer(grid: SliceGrid) {
  return (point: Vec3) => {
    const { column, row } = patientToPixel(grid, point);
    return [column, row] as const;
  };
}

const SQUARE: SliceGrid = {
  positionMm: [0, 0, 0],
  rowDirection: [1, 0, 0],
  columnDirection: [0, 1, 0],
  pixelSpacingMm: [0.5, 0.5],
  rows: 64,
  columns: 64,
};
const OBLONG: SliceGrid = { ...SQUARE, pixelSpacingMm: [0.5, 0.25] };

const close = (places: readonly (readonly number[])[]) =>
  places.map((place) => place.map((one) => Math.round(one * 1e9) / 1e9));

describe('graphicOf', () => {
  it('gives the end points of the longer axis, then of the shorter one', () => {
    // PS3.3 C.18.6.1.2, ELLIPSE: major axis first (from memory).
    const shape = { kind: 'ellipse', centreMm: [10, 8, 3], radiiMm: [1, 2] } as const;
    const graphic = graphicOf(shape, placer(SQUARE));
    expect(graphic?.type).toBe('ELLIPSE');
    expect(close(graphic?.places ?? [])).toEqual([
      [20, 12],
      [20, 20],
      [18, 16],
      [22, 16],
    ]);
  });

  it('takes the longer axis in pixels, since the places are pixels', () => {
    const shape = { kind: 'ellipse', centreMm: [10, 8, 0], radiiMm: [1, 1.5] } as const;
    // 1 mm along the row are 4 columns, 1.5 mm down are 3 rows.
    expect(close(graphicOf(shape, placer(OBLONG))?.places ?? [])).toEqual([
      [36, 16],
      [44, 16],
      [40, 13],
      [40, 19],
    ]);
  });

  it('turns with the axes of the ellipse', () => {
    const h = Math.SQRT1_2;
    const shape = {
      kind: 'ellipse',
      centreMm: [10, 10, 0],
      u: [h, h, 0],
      v: [-h, h, 0],
      radiiMm: [2, 1],
    } as const;
    const graphic = graphicOf(shape, placer(SQUARE));
    expect(graphic?.type).toBe('ELLIPSE');
    expect(close(graphic?.places ?? [])[1]).toEqual(close([[20 + 4 * h, 20 + 4 * h]])[0]);
  });

  it('is a closed polyline on the ellipse where pixels are not square and the ellipse is turned', () => {
    const h = Math.SQRT1_2;
    const shape = {
      kind: 'ellipse',
      centreMm: [10, 10, 0],
      u: [h, h, 0],
      v: [-h, h, 0],
      radiiMm: [2, 1],
    } as const;
    const graphic = graphicOf(shape, placer(OBLONG));
    expect([graphic?.type, graphic?.places.length]).toEqual(['POLYLINE', 91]);
    expect(graphic?.places[0]).toEqual(graphic?.places.at(-1));
    for (const [column, row] of graphic?.places ?? []) {
      const [x, y] = [column * 0.25 - 10, row * 0.5 - 10];
      expect(((x + y) * h) ** 2 / 4 + ((y - x) * h) ** 2).toBeCloseTo(1, 9);
    }
  });

  it('takes the axes of an oblique image for an ellipse that names none', () => {
    const grid: SliceGrid = {
      ...SQUARE,
      rowDirection: [0, 1, 0],
      columnDirection: [0, 0, -1],
    };
    const shape = { kind: 'ellipse', centreMm: [7, 10, -8], radiiMm: [2, 1] } as const;
    expect(close(graphicOf(shape, placer(grid))?.places ?? [])).toEqual([
      [16, 16],
      [24, 16],
      [20, 14],
      [20, 18],
    ]);
  });

  it('closes an outline with its first point', () => {
    const shape = {
      kind: 'outline',
      pointsMm: [
        [1, 1, 0],
        [2, 1, 0],
        [2, 3, 0],
      ],
    } as const;
    expect(graphicOf(shape, placer(SQUARE))).toEqual({
      type: 'POLYLINE',
      places: [
        [2, 2],
        [4, 2],
        [4, 6],
        [2, 2],
      ],
    });
  });

  it('is none without the image', () => {
    const shape = { kind: 'ellipse', centreMm: [0, 0, 0], radiiMm: [1, 1] } as const;
    expect(graphicOf(shape, () => undefined)).toBeUndefined();
  });
});
