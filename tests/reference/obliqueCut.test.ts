/**
 * Oblique cuts against others: trilinear against scipy.ndimage.map_coordinates (order 1), cubic against Keys' kernel written
 * out in numpy (Keys 1981, doi 10.1109/TASSP.1981.1163711); scipy's order 3 is a spline and no reference for it.
 */
import { describe, expect, it } from 'vitest';
import type { Vec3 } from '../../core/geometry/index.js';
import { cutStack, keysResponse, obliquePlane } from '../../core/oblique/index.js';
import { pythonHas, pythonJson } from '../support/python.js';
import { evenHeights, madeVolume } from '../unit/core/oblique/madeVolume.js';

const available = pythonHas('numpy', 'scipy');
const title = available
  ? 'oblique cuts, as scipy and numpy make them'
  : 'oblique cuts, as scipy and numpy make them (SKIPPED: install python3-scipy to run it)';

const [SLICES, ROWS, COLUMNS] = [20, 30, 36];
const HEIGHT_MM = 0.4;

/** Values without any order: a formula that both sides compute. */
const PROGRAM = `
import json, sys
import numpy as np
from scipy.ndimage import map_coordinates
order, spacing, position, row, column, side = json.loads(sys.argv[1])
k, j, i = np.meshgrid(np.arange(${SLICES}), np.arange(${ROWS}), np.arange(${COLUMNS}), indexing="ij")
volume = ((i * 7919 + j * 104729 + k * 1299709) % 1500 - 500).astype(float)
y, x = np.meshgrid(np.arange(side), np.arange(side), indexing="ij")
place = np.array(position)[:, None, None] + 0.35 * (x * np.array(row)[:, None, None] + y * np.array(column)[:, None, None])
at = np.array([place[2] / ${HEIGHT_MM}, place[1] / spacing, place[0] / spacing])
if order == 1:
    cut = map_coordinates(volume, at, order=1, mode="constant", cval=np.nan)
else:
    def weights(t):
        t = np.abs(t)
        near = 1.5 * t**3 - 2.5 * t**2 + 1
        far = -0.5 * t**3 + 2.5 * t**2 - 4 * t + 2
        return np.where(t <= 1, near, np.where(t < 2, far, 0))
    base = np.floor(at).astype(int)
    cut = np.zeros(at.shape[1:])
    for a in range(-1, 3):
        for b in range(-1, 3):
            for c in range(-1, 3):
                z, v, u = base[0] + a, base[1] + b, base[2] + c
                inside = (z >= 0) & (z < ${SLICES}) & (v >= 0) & (v < ${ROWS}) & (u >= 0) & (u < ${COLUMNS})
                value = volume[np.clip(z, 0, ${SLICES - 1}), np.clip(v, 0, ${ROWS - 1}), np.clip(u, 0, ${COLUMNS - 1})]
                weight = weights(at[0] - z) * weights(at[1] - v) * weights(at[2] - u)
                cut = cut + np.where(inside, value * weight, np.where(np.abs(weight) < 1e-12, 0, np.nan))
print(json.dumps([None if np.isnan(one) else float(one) for one in cut.ravel()]))
`;

describe.skipIf(!available)(title, () => {
  const courses: readonly (readonly [string, Vec3])[] = [
    ['10°', [Math.tan(Math.PI / 18), 0, 1]],
    ['37°', [0.6, 0.2, 0.8]],
    ['64°', [-1, 1.5, 0.9]],
    ['90°', [0.3, 1, 0]],
  ];
  const kernels = [
    ['soft', 0.5],
    ['sharp', 0.39],
  ] as const;
  const cases = courses.flatMap(([angle, course]) =>
    kernels.map(([kernel, spacing]) => ({ angle, course, kernel, spacing })),
  );

  it.each(cases)('agree at $angle on the $kernel stack', ({ course, spacing }) => {
    let pixel = 0;
    const made = madeVolume(
      (_point, slice) => {
        const index = pixel % (ROWS * COLUMNS);
        pixel += 1;
        const [i, j] = [index % COLUMNS, Math.floor(index / COLUMNS)];
        return ((i * 7919 + j * 104729 + slice * 1299709) % 1500) - 500;
      },
      {
        heightsMm: evenHeights(SLICES, HEIGHT_MM),
        rows: ROWS,
        columns: COLUMNS,
        pixelSpacingMm: [spacing, spacing],
        intercept: 0,
      },
    );
    const middle: Vec3 = [6.1, 5.3, 3.7];
    const plane = obliquePlane(
      [middle, [middle[0] + course[0], middle[1] + course[1], middle[2] + course[2]]],
      [made.stack.slices[0].image.grid],
      middle,
      { rows: 25, columns: 25, spacingMm: 0.35 },
    );
    if (!plane.ok) throw new Error(plane.refusal.text);
    const { positionMm, rowDirection, columnDirection } = plane.value;
    for (const [order, interpolation] of [
      [1, 'linear'],
      [3, 'cubic'],
    ] as const) {
      const theirs = pythonJson(PROGRAM, [
        JSON.stringify([order, spacing, positionMm, rowDirection, columnDirection, 25]),
      ]) as readonly (number | null)[];
      const cut = cutStack(made.stack, made.storedOf, plane.value, { interpolation });
      if (!cut.ok) throw new Error(cut.refusal.text);
      const known = theirs.flatMap((value, index) => (value === null ? [] : [{ value, index }]));
      expect(known.length).toBeGreaterThan(200);
      const worst = Math.max(
        ...known.map(({ value, index }) => Math.abs(value - (cut.value.hu[index] ?? Infinity))),
      );
      // Values of 32 bits: 1,000 HU to a part in 10⁷.
      expect(worst).toBeLessThan(2e-3);
    }
  });
});

describe.skipIf(!available)('what cubic convolution does to a frequency', () => {
  it('is the Fourier transform of its kernel, summed in numpy', () => {
    const frequencies = [0, 0.05, 0.2, 0.35, 0.5, 0.8, 1.3];
    const theirs = pythonJson(
      `
import json, sys
import numpy as np
t = (np.arange(400000) + 0.5) / 100000 - 2
a = np.abs(t)
kernel = np.where(a <= 1, 1.5 * a**3 - 2.5 * a**2 + 1, -0.5 * a**3 + 2.5 * a**2 - 4 * a + 2)
print(json.dumps([float(np.sum(kernel * np.cos(2 * np.pi * f * t)) / 100000) for f in json.loads(sys.argv[1])]))
`,
      [JSON.stringify(frequencies)],
    ) as readonly number[];
    theirs.forEach((value, index) => {
      expect(keysResponse(frequencies[index] ?? Number.NaN)).toBeCloseTo(value, 5);
    });
  });
});
