import { describe, expect, it } from 'vitest';
import {
  cross,
  distance,
  dot,
  gridNormal,
  normalise,
  patientToPixel,
  pixelToPatient,
  type SliceGrid,
  subtract,
  type Vec3,
} from '../../../../core/geometry/index.js';
import { angleToSlicesDeg, obliquePlane } from '../../../../core/oblique/index.js';

const AXIAL: SliceGrid = {
  positionMm: [-80, -70, 12],
  rowDirection: [1, 0, 0],
  columnDirection: [0, 1, 0],
  pixelSpacingMm: [0.4, 0.4],
  rows: 400,
  columns: 400,
};
const FINER: SliceGrid = { ...AXIAL, positionMm: [-40, -30, 12], pixelSpacingMm: [0.3, 0.3] };

function planeOf(...args: Parameters<typeof obliquePlane>): SliceGrid {
  const plane = obliquePlane(...args);
  if (!plane.ok) throw new Error(plane.refusal.text);
  return plane.value;
}

function expectPoint(found: Vec3 | undefined, wanted: Vec3, digits = 12): void {
  found?.forEach((value, axis) => {
    expect(value).toBeCloseTo(wanted[axis] ?? Number.NaN, digits);
  });
  expect(found).toHaveLength(3);
}

describe('obliquePlane', () => {
  it('stands at right angles to the course, with the middle of it on its middle pixel', () => {
    const course = [
      [1, 2, 3],
      [4, 6, 15],
    ] as const;
    const plane = planeOf(course, [AXIAL], undefined, { rows: 9, columns: 12, spacingMm: 0.5 });
    // The course is (3, 4, 12), 13 mm long.
    expectPoint(gridNormal(plane), [3 / 13, 4 / 13, 12 / 13]);
    expectPoint(pixelToPatient(plane, { column: 6, row: 4 }), [2.5, 4, 9]);
    expect([plane.rows, plane.columns, plane.pixelSpacingMm]).toEqual([9, 12, [0.5, 0.5]]);
    expect(dot(plane.rowDirection, plane.columnDirection)).toBeCloseTo(0, 14);
    expect([plane.rowDirection, plane.columnDirection].map((v) => Math.hypot(...v))).toEqual([
      expect.closeTo(1, 14),
      expect.closeTo(1, 14),
    ]);
  });

  it('goes through another point when one is given', () => {
    const course = [
      [0, 0, 0],
      [0, 1, 1],
    ] as const;
    const plane = planeOf(course, [AXIAL], [7, 8, 9], { rows: 8, columns: 8 });
    expectPoint(pixelToPatient(plane, { column: 4, row: 4 }), [7, 8, 9]);
  });

  it('leans by the rotation of the smallest angle: a course 30° to the back leaves the rows and turns the columns', () => {
    const half = Math.sqrt(3) / 2;
    const course = [
      [0, 0, 0],
      [0, 0.5, half],
    ] as const;
    const plane = planeOf(course, [AXIAL]);
    expectPoint(plane.rowDirection, [1, 0, 0]);
    expectPoint(plane.columnDirection, [0, half, -0.5]);
    expect(angleToSlicesDeg(plane, AXIAL)).toBeCloseTo(30, 10);
  });

  it('has the directions that are the nearest of all in the plane to the slice’s', () => {
    const course = [
      [0, 0, 0],
      [0.7, -0.5, 0.4],
    ] as const;
    const { rowDirection, columnDirection } = planeOf(course, [AXIAL]);
    const nearness = (angle: number): number => {
      const [c, s] = [Math.cos(angle), Math.sin(angle)];
      return (
        c * rowDirection[0] + s * columnDirection[0] - s * rowDirection[1] + c * columnDirection[1]
      );
    };
    const others = Array.from({ length: 71 }, (_, step) => nearness(((step + 1) * Math.PI) / 36));
    expect(Math.max(...others)).toBeLessThan(nearness(0));
  });

  it('is the slice’s own grid for a course along its normal, pixels on pixels of the finer stack', () => {
    const course = [
      [3.3, 4.4, 0],
      [3.3, 4.4, 5],
    ] as const;
    const plane = planeOf(course, [AXIAL, FINER], undefined, { rows: 64, columns: 64 });
    expect([plane.rowDirection, plane.columnDirection, plane.pixelSpacingMm]).toEqual([
      [1, 0, 0],
      [0, 1, 0],
      [0.3, 0.3],
    ]);
    const { column, row } = patientToPixel(FINER, plane.positionMm);
    expect([column, row]).toEqual([
      expect.closeTo(Math.round(column), 9),
      expect.closeTo(Math.round(row), 9),
    ]);
    const centre = pixelToPatient(plane, { column: 32, row: 32 });
    expect(centre[2]).toBe(2.5);
    expect(distance(centre, [3.3, 4.4, 2.5])).toBeLessThanOrEqual(0.3 * Math.SQRT1_2);
  });

  it('is seen from where the slices are seen from, whichever point comes first', () => {
    const [a, b]: readonly [Vec3, Vec3] = [
      [0, 0, 0],
      [2, 1, 3],
    ];
    expect(planeOf([b, a], [AXIAL])).toEqual(planeOf([a, b], [AXIAL]));
    expect(dot(gridNormal(planeOf([b, a], [AXIAL])), gridNormal(AXIAL))).toBeGreaterThan(0);
  });

  it('keeps to the side of the last plane while a course is dragged past the plane of the slices', () => {
    const before = planeOf(
      [
        [0, 0, 0],
        [1, 0, 0.01],
      ],
      [AXIAL],
    );
    const course: readonly [Vec3, Vec3] = [
      [0, 0, 0],
      [1, 0, -0.01],
    ];
    const after = planeOf(course, [AXIAL], undefined, { sideOf: gridNormal(before) });
    expect(dot(after.rowDirection, before.rowDirection)).toBeGreaterThan(0.999);
    expect(dot(after.columnDirection, before.columnDirection)).toBeGreaterThan(0.999);
    // Without it the same course is seen from the other side.
    expect(dot(planeOf(course, [AXIAL]).rowDirection, before.rowDirection)).toBeLessThan(-0.999);
  });

  it('follows a slice that leans itself', () => {
    const rowDirection = normalise([1, 0.1, 0.2]) as Vec3;
    const columnDirection = normalise(cross([0.3, 0, 1], rowDirection)) as Vec3;
    const leaning = { ...AXIAL, rowDirection, columnDirection };
    const normal = gridNormal(leaning);
    const plane = planeOf([[0, 0, 0], normal], [leaning]);
    expect(plane.rowDirection).toEqual(rowDirection);
    expect(plane.columnDirection).toEqual(columnDirection);
  });

  it('turns a page for a course that is seen from behind', () => {
    const course = [
      [0, 0, 0],
      [0, 0, 1],
    ] as const;
    const plane = planeOf(course, [AXIAL], undefined, { sideOf: [0, 0, -1] });
    expectPoint(plane.rowDirection, [-1, 0, 0]);
    expectPoint(plane.columnDirection, [0, 1, 0]);
    expectPoint(gridNormal(plane), [0, 0, -1]);
  });

  it('moves smoothly with the course', () => {
    const at = (angle: number) =>
      planeOf(
        [
          [0, 0, 0],
          [Math.sin(angle), 0.2, Math.cos(angle)],
        ],
        [AXIAL],
      );
    for (let angle = 0; angle < 1.3; angle += 0.02) {
      const [a, b] = [at(angle), at(angle + 0.001)];
      expect(Math.hypot(...subtract(a.rowDirection, b.rowDirection))).toBeLessThan(0.0021);
      expect(Math.hypot(...subtract(a.columnDirection, b.columnDirection))).toBeLessThan(0.0021);
    }
  });

  it('refuses two points on one another and slices without a scale', () => {
    expect(
      obliquePlane(
        [
          [1, 1, 1],
          [1, 1, 1],
        ],
        [AXIAL],
      ),
    ).toMatchObject({
      ok: false,
      refusal: { code: 'no-course' },
    });
    expect(
      obliquePlane(
        [
          [1, 1, 1],
          [1, 1, Number.NaN],
        ],
        [AXIAL],
      ),
    ).toMatchObject({
      ok: false,
      refusal: { code: 'no-course' },
    });
    expect(
      obliquePlane(
        [
          [1, 1, 1],
          [1, 1, 2],
        ],
        [AXIAL, { ...AXIAL, unscaled: true }],
      ),
    ).toMatchObject({ ok: false, refusal: { code: 'no-pixel-spacing' } });
    expect(() =>
      obliquePlane(
        [
          [1, 1, 1],
          [1, 1, 2],
        ],
        [AXIAL],
        undefined,
        { spacingMm: 0 },
      ),
    ).toThrow('invalid spacing: 0');
  });
});
