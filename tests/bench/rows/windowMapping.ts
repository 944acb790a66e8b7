import { measure } from 'mitata';
import type { PixelEncoding } from '../../../core/dicom/index.js';
import { windowed } from '../../../core/intensity/index.js';
import { greyTable, mapGreys } from '../../../renderer/plates/greyTables.js';
import { pythonHas, pythonJson } from '../../support/python.js';
import type { Row } from '../row.js';

const PIXELS: PixelEncoding = {
  bitsAllocated: 16,
  bitsStored: 16,
  highBit: 15,
  signed: true,
  photometric: 'MONOCHROME2',
  rescale: { slope: 1, intercept: -1024 },
  unit: 'HU',
};
const WINDOW = { centre: 300, width: 1200, function: 'LINEAR' } as const;

const NUMPY = `
import json, time, numpy as np
rng = np.random.default_rng(1)
stored = rng.integers(0, 3000, (512, 512)).astype(np.int16)
def once():
    hu = stored.astype(np.float32) - 1024
    grey = np.clip(((hu - 299.5) / 1199 + 0.5) * 255, 0, 255).round().astype(np.uint32)
    return 0xff000000 | grey * 0x010101
once()
times = []
for _ in range(40):
    start = time.perf_counter(); once(); times.append(time.perf_counter() - start)
print(json.dumps(sorted(times)[20] * 1000))
`;

/** Stored values of a 512² slice to the pixels of a canvas, through the table that scrolling keeps. */
export async function windowMapping(): Promise<Row> {
  const stored = Int16Array.from({ length: 512 * 512 }, (_, index) => (index * 7919) % 3000);
  const target = new Uint32Array(stored.length);
  const { p50 } = await measure(() => mapGreys(stored, greyTable(PIXELS, WINDOW), target));
  stored.forEach((value, index) => {
    const grey = Math.round(windowed(value - 1024, WINDOW));
    if (((target[index] ?? 0) & 0xff) !== grey) throw new Error(`wrong grey of: ${value}`);
  });
  return {
    work: 'window mapping of 512², exact to PS3.3',
    measured: p50 / 1e6,
    unit: 'ms',
    budget: 0.6,
    ...(pythonHas('numpy') && {
      reference: { name: 'numpy', measured: pythonJson(NUMPY) as number },
    }),
  };
}
