import {
  backProject,
  filterSinogram,
  type ImageGrid,
  type Kernel,
  type ParallelScan,
} from '../../../core/phantom/index.js';
import { pythonHas, pythonJson } from '../../support/python.js';
import type { Row } from '../row.js';

const SCAN: ParallelScan = {
  views: 600,
  // What scikit-image's radon gives for 512²: the diagonal of the image.
  detectors: 725,
  pitchMm: 1,
  blurSigmaMm: 0,
  waterPerMm: 0.02,
};
const GRID: ImageGrid = { centreMm: [0, 0], fieldOfViewMm: 512, matrix: 512 };
const KERNEL: Kernel = { apodisation: 'ram-lak', cutOffPerMm: 0.5 };

const IRADON = `
import json, time, warnings, numpy as np
warnings.simplefilter('ignore')
from skimage.transform import iradon
sinogram = np.random.default_rng(1).normal(size=(725, 600))
theta = np.arange(600) * 180.0 / 600
times = []
for _ in range(3):
    start = time.perf_counter()
    iradon(sinogram, theta=theta, filter_name='ramp', output_size=512, circle=False)
    times.append(time.perf_counter() - start)
print(json.dumps(sorted(times)[1] * 1000))
`;

/** Filter and back projection of 600 views into 512², in one thread. */
export async function backProjection(): Promise<Row> {
  const sinogram = Float64Array.from(
    { length: SCAN.views * SCAN.detectors },
    (_, index) => Math.sin(index * 0.7) + Math.cos(index * 0.013),
  );
  const times: number[] = [];
  for (let run = 0; run < 5; run++) {
    const start = performance.now();
    backProject(filterSinogram(sinogram, SCAN, KERNEL), SCAN, GRID);
    times.push(performance.now() - start);
  }
  return {
    work: 'filtered back projection, 512² of 600 views, one thread',
    measured: times.sort((a, b) => a - b)[2] ?? Number.NaN,
    unit: 'ms',
    ...(pythonHas('skimage') && {
      reference: { name: 'scikit-image iradon', measured: pythonJson(IRADON) as number },
    }),
    fasterThanReference: 3,
  };
}
