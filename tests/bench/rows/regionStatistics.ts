import { measure } from 'mitata';
import { decodeImage, type StoredValues } from '../../../core/dicom/index.js';
import type { KernelTexture } from '../../../core/quality/index.js';
import { measureRegion, type Shape } from '../../../core/region/index.js';
import { buildStacks, type Stack } from '../../../core/stack/index.js';
import { ctSlice } from '../../corpus/ctSlice.js';
import { pythonHas, pythonJson } from '../../support/python.js';
import type { Row } from '../row.js';

const NUMPY = `
import json, time, numpy as np
image = (np.arange(512 * 512).reshape(512, 512) % 997).astype(np.int16)
ys, xs = np.mgrid[0:512, 0:512]
def once():
    inside = (xs - 256) ** 2 + (ys - 256) ** 2 <= 400
    v = image[inside] * 1.0 - 1024.0
    return v.size, v.mean(), v.std(ddof=1), v.min(), v.max(), np.median(v)
once()
times = []
for _ in range(40):
    start = time.perf_counter(); once(); once(); times.append(time.perf_counter() - start)
print(json.dumps(sorted(times)[20] * 1000))
`;

/** A texture as the demonstration has them: rings up to 1 per mm, a hundred uniform areas. */
const SOFT_TEXTURE: KernelTexture = {
  noiseSdHu: 10,
  areas: 100,
  frequencyPerMm: Array.from({ length: 13 }, (_, ring) => 0.02 + ring * 0.08),
  powerHu2Mm2: Array.from({ length: 13 }, (_, ring) => 400 * Math.exp(-ring / 3)),
  meanPerMm: 0.2,
  peakPerMm: 0.1,
  riseMm: 1.7,
  blurFwhmMm: 1.5,
  places: Array.from({ length: 100 }, (_, index) => ({
    centreMm: [(index % 10) * 10, Math.floor(index / 10) * 10, 0],
    sdHu: 9 + (index % 3),
    meanHu: 300 + (index % 7),
  })),
};
const SHARP_TEXTURE: KernelTexture = {
  ...SOFT_TEXTURE,
  noiseSdHu: 40,
  riseMm: 0.8,
  blurFwhmMm: 0.75,
};

/** Statistics of a region of 20 pixels radius on both stacks, with standard error and placement sensitivity. */
export async function regionStatistics(): Promise<Row> {
  const [soft, sharp] = [await makeStack('2.25.7.1'), await makeStack('2.25.7.2')];
  const shape: Shape = { kind: 'ellipse', centreMm: [54, 108, 0], radiiMm: [10, 10] };
  const besideSharp = { ...sharp, noise: SHARP_TEXTURE };
  const besideSoft = { ...soft, noise: SOFT_TEXTURE };
  const { p50 } = await measure(() => {
    measureRegion(shape, soft.stack, soft.storedOf, SOFT_TEXTURE, besideSharp);
    measureRegion(shape, sharp.stack, sharp.storedOf, SHARP_TEXTURE, besideSoft);
  });
  return {
    work: 'region statistics on both stacks, radius 20 px, with standard error and placement',
    measured: p50 / 1e6,
    unit: 'ms',
    budget: 0.3,
    ...(pythonHas('numpy') && {
      reference: { name: 'numpy without these two', measured: pythonJson(NUMPY) as number },
    }),
  };
}

async function makeStack(series: string): Promise<{ stack: Stack; storedOf: () => StoredValues }> {
  const stored = Int16Array.from({ length: 512 * 512 }, (_, index) => index % 997);
  const spacing = { 2621488: { tag: 0x00280030, vr: 'DS', value: [0.5, 0.5] } as const };
  const decoded = await decodeImage(
    ctSlice({ rows: 512, columns: 512, stored, series, change: spacing }),
  );
  if (!decoded.ok) throw new Error(decoded.refusal.text);
  const { image } = decoded.value;
  const [stack] = buildStacks([{ fileId: 0, file: 'slice', image }]).stacks;
  if (stack === undefined) throw new Error('no stack');
  return { stack, storedOf: () => decoded.value.stored };
}
