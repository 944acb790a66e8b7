import { describe, expect, it } from 'vitest';
import type { SliceGrid, Vec3 } from '../../../../core/geometry/index.js';
import {
  asSlice,
  type CutOptions,
  cutStack,
  measureEdgeLineOnCut,
  measureProfileOnCut,
  measureRegionOnCut,
  obliquePlane,
  type StackCut,
  slicesOfCut,
  thicknessInPlane,
} from '../../../../core/oblique/index.js';
import { evenHeights, type MadeVolume, madeVolume, type VolumeMade } from './madeVolume.js';

const HEIGHTS = evenHeights(16, 0.5);
const LINEAR = ([x, y, z]: Vec3): number => 16 * x - 24 * y + 40 * z;
const SQUARE = ([x, y, z]: Vec3): number => 8 * x * x - 16 * y + 24 * z * z - 8 * x * z;

/** A plane through the middle of the volume, at right angles to a course. */
function planeAcross(course: Vec3, { stack }: VolumeMade, side = 9): SliceGrid {
  const middle: Vec3 = [8, 6, 4];
  const plane = obliquePlane(
    [middle, [middle[0] + course[0], middle[1] + course[1], middle[2] + course[2]]],
    [stack.slices[0].image.grid],
    middle,
    { rows: side, columns: side, spacingMm: 0.4 },
  );
  if (!plane.ok) throw new Error(plane.refusal.text);
  return plane.value;
}

function cutOf(made: VolumeMade, grid: SliceGrid, options?: CutOptions): StackCut {
  const cut = cutStack(made.stack, made.storedOf, grid, options);
  if (!cut.ok) throw new Error(cut.refusal.text);
  return cut.value;
}

function placesOf({
  positionMm,
  rowDirection,
  columnDirection,
  pixelSpacingMm,
  rows,
  columns,
}: SliceGrid) {
  return Array.from({ length: rows * columns }, (_, index): Vec3 => {
    const [x, y] = [index % columns, Math.floor(index / columns)];
    const at = (axis: 0 | 1 | 2): number =>
      positionMm[axis] +
      x * pixelSpacingMm[1] * rowDirection[axis] +
      y * pixelSpacingMm[0] * columnDirection[axis];
    return [at(0), at(1), at(2)];
  });
}

function expectField(cut: StackCut, field: (point: Vec3) => number, within: number): void {
  placesOf(cut.grid).forEach((place, index) => {
    expect(Math.abs((cut.hu[index] ?? Number.NaN) - field(place))).toBeLessThanOrEqual(within);
  });
}

const COURSES: readonly (readonly [string, Vec3])[] = [
  ['along the slices’ normal', [0, 0, 1]],
  ['30° to it', [0.5, 0, Math.sqrt(3) / 2]],
  ['45° to it', [0, 1, 1]],
  ['in the slices', [1, 0, 0]],
  ['askew', [1, -2, 1.5]],
];

function clamped(part: number): number {
  return Math.min(1, Math.max(0, part));
}

/** Steps of 1/8 HU, so that rounding of the stored values does not hide a fault. */
const FINE: Partial<MadeVolume> = { slopeOf: () => 0.125, intercept: 0 };

describe('cutStack', () => {
  it.each(COURSES)('gives a field without bends exactly, both ways: a course %s', (_, course) => {
    const made = madeVolume(LINEAR, { heightsMm: HEIGHTS, ...FINE });
    const plane = planeAcross(course, made);
    for (const interpolation of ['linear', 'cubic'] as const)
      expectField(cutOf(made, plane, { interpolation }), LINEAR, 0.1);
  });

  // Keys 1981, doi 10.1109/TASSP.1981.1163711: with a = −1/2 the kernel gives polynomials of the second order exactly.
  it.each(COURSES)('gives a parabola exactly by cubic convolution: a course %s', (_, course) => {
    const made = madeVolume(SQUARE, { heightsMm: HEIGHTS, ...FINE });
    expectField(cutOf(made, planeAcross(course, made), { interpolation: 'cubic' }), SQUARE, 0.2);
  });

  it('takes uneven slices at their true heights', () => {
    const heightsMm = [0, 0.5, 1.2, 1.7, 2.4, 3, 3.4, 4.1, 4.9, 5.3, 6, 6.6, 7.3];
    const made = madeVolume(LINEAR, { heightsMm, ...FINE });
    expectField(cutOf(made, planeAcross([0, 1, 1], made)), LINEAR, 0.1);
  });

  it('takes each slice with its own place and its own rescale: a sheared stack', () => {
    const made = madeVolume(LINEAR, {
      heightsMm: HEIGHTS,
      shearPerMm: 0.2,
      slopeOf: (slice) => (slice % 2 === 0 ? 0.125 : 0.25),
      intercept: 0,
    });
    expectField(cutOf(made, planeAcross([1, 0, 2], made)), LINEAR, 0.3);
  });

  it('averages a slab over its thickness: the mean of a parabola is a twelfth of its square above the middle', () => {
    const made = madeVolume(([, , z]) => 48 * z * z, { heightsMm: HEIGHTS, ...FINE });
    const plane = planeAcross([0, 0, 1], made);
    const [thin, thick] = [undefined, 3].map((slabMm) =>
      cutOf(made, plane, { interpolation: 'cubic', slabMm }),
    );
    // Planes a quarter of a mm apart at most, each in the middle of its share: (T² − step²)/12 above the middle.
    const more = (thick?.hu[40] ?? Number.NaN) - (thin?.hu[40] ?? Number.NaN);
    const step = 3 / (thick?.resampling.planes ?? Number.NaN);
    expect(thick?.resampling).toEqual({ interpolation: 'cubic', slabMm: 3, planes: 12 });
    expect(more).toBeCloseTo((48 * (9 - step * step)) / 12, 0);
  });

  it('has no value outside, next to padding, and at slices that can’t be had; these are named', () => {
    const padding = { low: -2000, high: -2000 };
    const made = madeVolume((point) => (point[0] > 9 ? -2000 : LINEAR(point)), {
      heightsMm: HEIGHTS,
      intercept: 0,
      padding,
    });
    const plane = planeAcross([0, 1, 1], made);
    const cut = cutOf(made, plane);
    placesOf(plane).forEach(([x], index) => {
      if (x > 9) expect(cut.hu[index]).toBeNaN();
      if (x < 8.5) expect(cut.hu[index]).not.toBeNaN();
    });
    const gap = cutStack(
      made.stack,
      (index) => (index === 8 ? undefined : made.stored[index]),
      plane,
    );
    expect(gap).toMatchObject({ ok: true, value: { lacking: [8] } });
    const far = { ...plane, positionMm: [100, 100, 100] as const };
    expect([...cutOf(made, far).hu].every(Number.isNaN)).toBe(true);
  });

  it('names the slices that it needs before they are read', () => {
    const made = madeVolume(LINEAR, { heightsMm: HEIGHTS });
    expect(slicesOfCut(made.stack, planeAcross([0, 0, 1], made))).toContain(8);
    const across = planeAcross([1, 0, 0], made);
    const cut = cutOf(made, across);
    const needed = slicesOfCut(made.stack, across);
    expect(needed).toContain(cut.slices?.first);
    expect(needed).toContain(cut.slices?.last);
  });

  it('is refused without HU, without spacing and where slices lean', () => {
    const made = madeVolume(LINEAR, { heightsMm: HEIGHTS });
    const plane = planeAcross([0, 1, 1], made);
    const codeOf = (stack: VolumeMade['stack']) => {
      const cut = cutStack(stack, made.storedOf, plane);
      return cut.ok ? undefined : cut.refusal.code;
    };
    expect(codeOf({ ...made.stack, unit: 'stored' })).toBe('not-hu');
    const [first, second, ...rest] = made.stack.slices;
    if (second === undefined) throw new Error('one slice alone');
    const leaning = {
      ...second,
      image: {
        ...second.image,
        grid: {
          ...second.image.grid,
          columnDirection: [0, Math.cos(0.1), Math.sin(0.1)] as const,
        },
      },
    };
    expect(codeOf({ ...made.stack, slices: [first, leaning, ...rest] })).toBe('slices-lean');
  });
});

describe('What is measured on a cut', () => {
  // An edge of 1 mm, as a kernel leaves one.
  const made = madeVolume(([x, y]) => 400 * clamped(3 - Math.hypot(x - 8, y - 6)), {
    heightsMm: HEIGHTS,
    rows: 48,
    columns: 64,
    pixelSpacingMm: [0.25, 0.25],
    intercept: 0,
  });
  const plane = planeAcross([0, 0.5, Math.sqrt(3) / 2], made, 61);
  const slice = asSlice(cutOf(made, plane, { interpolation: 'cubic' }));

  it('is an image of no file that says how it was made', () => {
    const { image } = slice.stack.slices[0];
    expect(image.sopInstanceUid).toBe('');
    expect(image.imageType).toEqual(['DERIVED', 'SECONDARY', 'REFORMATTED']);
    expect(slice.stack.findings.at(-1)).toEqual({
      code: 'resampled',
      text: 'An oblique cut, resampled by cubic convolution: no slice of the scanner.',
    });
    expect(slice.source?.first.sopInstanceUid).toMatch(/^2\.25\.1\d\d$/);
  });

  it('is marked as resampled, names no image, and has no standard error', () => {
    const { rowDirection: u, columnDirection: v } = plane;
    const centreMm: Vec3 = [8, 6, 4];
    const region = measureRegionOnCut({ kind: 'ellipse', centreMm, u, v, radiiMm: [1, 1] }, slice);
    expect(region.meanHu).toBeCloseTo(400, 0);
    expect(region).toMatchObject({ standardErrorHu: null, sopInstanceUid: null, sliceIndex: null });
    expect(region.flags.map(({ code }) => code)).toEqual(
      expect.arrayContaining(['resampled', 'no-standard-error', 'edges-not-sought']),
    );
    const end = (part: number): Vec3 => [8 + part * u[0], 6 + part * u[1], 4 + part * u[2]];
    const line = { fromMm: end(-6), toMm: end(6), bandMm: 1 };
    const profile = measureProfileOnCut(line, slice);
    // The tube is 5 mm wide, seen at right angles to the lean.
    expect(profile.visibleWidthMm).toBeGreaterThan(4.8);
    expect(profile.visibleWidthMm).toBeLessThan(5.2);
    expect(profile.flags[0]?.code).toBe('resampled');
    const edge = measureEdgeLineOnCut({ fromMm: end(0), toMm: end(5), bandMm: 2 }, slice);
    expect(edge.sopInstanceUid).toBeNull();
  });
});

describe('thicknessInPlane', () => {
  it('splits a thickness of 0.6 mm seen at 30° into 0.3 mm along the plane and 0.52 mm across', () => {
    const made = madeVolume(LINEAR, { heightsMm: HEIGHTS });
    const plane = planeAcross([0, 0.5, Math.sqrt(3) / 2], made);
    const seen = thicknessInPlane(plane, made.stack.slices[0].image.grid, 0.6);
    expect(seen.alongMm).toBeCloseTo(0.3, 10);
    expect(seen.acrossMm).toBeCloseTo(0.519615, 6);
    expect(seen.direction?.[0]).toBeCloseTo(0, 10);
  });
});
