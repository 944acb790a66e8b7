import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import {
  backProject,
  filterSinogram,
  type Inset,
  type ParallelScan,
  projectSlice,
} from '../../core/phantom/index.js';

const PYTHON = '/usr/bin/python3';
const has = spawnSync(PYTHON, ['-c', 'import skimage.transform']).status === 0;

/** scikit-image's iradon turns the other way round: its rows run against ours. */
const SCRIPT = `
import sys, numpy
from skimage.transform import iradon
folder, views, detectors, size = sys.argv[1], *map(int, sys.argv[2:5])
sinogram = numpy.fromfile(folder + '/sinogram', '<f8').reshape(views, detectors).T
theta = numpy.arange(views) * 180.0 / views
for name in ('ramp', 'shepp-logan'):
    image = iradon(sinogram, theta=theta, filter_name=name, output_size=size, circle=True)
    image[::-1].astype('<f8').tofile(folder + '/' + name)
`;

const scan: ParallelScan = {
  views: 90,
  detectors: 129,
  pitchMm: 1,
  blurSigmaMm: 0.5,
  waterPerMm: 0.02,
};
const SIZE = 129;

describe.skipIf(!has)(
  `filtered back projection against scikit-image’s iradon${has ? '' : ' (skipped: /usr/bin/python3 has no skimage)'}`,
  () => {
    const folder = mkdtempSync(join(tmpdir(), 'diptych-iradon-'));
    afterAll(() => rmSync(folder, { recursive: true, force: true }));
    const blob = (
      x: number,
      y: number,
      a: number,
      b: number,
      angleDeg: number,
      hu: number,
    ): Inset => ({
      name: 'blob',
      centreMm: [x, y],
      radiiMm: [a, b],
      angleDeg,
      hu,
      aroundHu: -1000,
    });
    const sinogram = projectSlice(
      {
        painted: [],
        insets: [
          blob(4, -6, 40, 28, 20, 0),
          blob(-12, 9, 6, 11, -35, 300),
          blob(25, -14, 2, 3, 0, 2000),
        ],
      },
      scan,
    );
    writeFileSync(join(folder, 'sinogram'), Buffer.from(sinogram.buffer));
    execFileSync(PYTHON, [
      '-c',
      SCRIPT,
      folder,
      String(scan.views),
      String(scan.detectors),
      String(SIZE),
    ]);

    it.each([
      ['ramp', 'ram-lak'],
      ['shepp-logan', 'shepp-logan'],
    ] as const)('with its filter %s gives the same image', (theirs, ours) => {
      const kernel = { apodisation: ours, cutOffPerMm: 0.5 };
      const grid = { centreMm: [0, 0] as const, fieldOfViewMm: SIZE, matrix: SIZE };
      const image = backProject(filterSinogram(sinogram, scan, kernel), scan, grid);
      const bytes = readFileSync(join(folder, theirs));
      const reference = new Float64Array(
        bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.length),
      );
      let largest = 0;
      let compared = 0;
      reference.forEach((value, pixel) => {
        const x = (pixel % SIZE) - 64;
        const y = Math.floor(pixel / SIZE) - 64;
        // iradon leaves the corners empty.
        if (x * x + y * y > 62 * 62) return;
        compared += 1;
        largest = Math.max(largest, Math.abs(value - (image[pixel] ?? Number.NaN)));
      });
      expect(compared).toBeGreaterThan(12_000);
      // Values reach 0.06 per mm; the two programs round differently in their transforms only.
      expect(largest).toBeLessThan(1e-9);
    });
  },
);
