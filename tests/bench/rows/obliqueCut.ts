import { performance } from 'node:perf_hooks';
import { cutStack, obliquePlane } from '../../../core/oblique/index.js';
import { pythonHas, pythonJson } from '../../support/python.js';
import { imageStack } from '../evidence/imageStack.js';
import type { Row } from '../row.js';

const SLICES = 300;
const SIDE = 512;

const SCIPY = `
import json, time, numpy as np
from scipy.ndimage import map_coordinates
volume = np.random.default_rng(1).integers(-500, 1000, (${SLICES}, ${SIDE}, ${SIDE})).astype(np.int16)
y, x = np.meshgrid(np.arange(${SIDE}) - 256.0, np.arange(${SIDE}) - 256.0, indexing="ij")
at = np.array([150 + 0.6 * 0.39 / 0.4 * y, 256.0 + 0.8 * y, 256.0 + x])
def once():
    map_coordinates(volume, at, order=1, output=np.float32, mode="constant", cval=np.nan)
once()
times = []
for _ in range(7):
    start = time.perf_counter(); once(); times.append(time.perf_counter() - start)
print(json.dumps(sorted(times)[3] * 1000))
`;

/** A trilinear oblique cut of 512² through 300 slices of 512². */
export async function obliqueCut(): Promise<Row> {
  const hu = Float64Array.from(
    { length: SIDE * SIDE },
    (_, pixel) => ((pixel * 7919) % 1500) - 500,
  );
  const { stack, stored } = imageStack(
    'bench',
    { centreMm: [0, 0], fieldOfViewMm: SIDE * 0.39, matrix: SIDE },
    Array.from({ length: SLICES }, (_, slice) => ({ zMm: slice * 0.4, hu })),
  );
  const plane = obliquePlane(
    [
      [0, 0, 60],
      [0, 0.6, 60.8],
    ],
    [stack.slices[0].image.grid],
  );
  if (!plane.ok) throw new Error(plane.refusal.text);
  const times: number[] = [];
  for (let run = 0; run < 40; run += 1) {
    const start = performance.now();
    const cut = cutStack(stack, (index) => stored[index], plane.value);
    times.push(performance.now() - start);
    if (!cut.ok || cut.value.lacking.length > 0) throw new Error('the cut lacks slices');
  }
  return {
    work: 'oblique cut of 512², trilinear',
    measured: times.sort((a, b) => a - b)[20] ?? Number.NaN,
    unit: 'ms',
    budget: 10,
    ...(pythonHas('scipy') && {
      reference: { name: 'scipy map_coordinates', measured: pythonJson(SCIPY) as number },
    }),
  };
}
