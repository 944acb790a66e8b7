import { describe, expect, it } from 'vitest';
import {
  gridNormal,
  patientToPixel,
  pixelToPatient,
  type SliceGrid,
} from '../../core/geometry/index.js';

// PS3.3 C.7.6.2.1.1, equation C.7.6.2.1-1, with numbers computed from it by numpy.
const TURNED: SliceGrid = {
  positionMm: [10, -20, 30],
  rowDirection: [Math.cos(Math.PI / 6), Math.sin(Math.PI / 6), 0],
  columnDirection: [-Math.sin(Math.PI / 6), Math.cos(Math.PI / 6), 0],
  pixelSpacingMm: [0.5, 0.25],
  rows: 128,
  columns: 128,
};

const SAGITTAL: SliceGrid = {
  positionMm: [5, -100, 80],
  rowDirection: [0, 1, 0],
  columnDirection: [0, 0, -1],
  pixelSpacingMm: [0.3, 0.4],
  rows: 64,
  columns: 64,
};

describe('pixelToPatient', () => {
  it.each([
    [1, 0, 10.216506, -19.875, 30],
    [0, 1, 9.75, -19.566987, 30],
    [100, 50, 19.150635, 14.150635, 30],
  ])('takes column spacing along a row: column %d row %d', (column, row, x, y, z) => {
    const point = pixelToPatient(TURNED, { column, row });
    expect(point[0]).toBeCloseTo(x, 6);
    expect(point[1]).toBeCloseTo(y, 6);
    expect(point[2]).toBeCloseTo(z, 6);
  });

  it('places a sagittal pixel, whose normal is (−1, 0, 0)', () => {
    const point = pixelToPatient(SAGITTAL, { column: 10, row: 20 });
    [5, -96, 74].forEach((value, axis) => {
      expect(point[axis]).toBeCloseTo(value, 9);
    });
    expect(gridNormal(SAGITTAL)).toEqual([-1, 0, 0]);
  });

  it('is undone by patientToPixel', () => {
    const back = patientToPixel(TURNED, pixelToPatient(TURNED, { column: 12.25, row: 99.5 }));
    expect(back.column).toBeCloseTo(12.25, 10);
    expect(back.row).toBeCloseTo(99.5, 10);
  });
});
