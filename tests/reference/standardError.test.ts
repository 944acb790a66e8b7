import { describe, expect, it } from 'vitest';
import {
  detrendQuadratic,
  type KernelTexture,
  noisePower,
  type PixelRun,
  standardErrorOfMean,
  type TextureArea,
  textureOf,
} from '../../core/quality/index.js';
import { pythonHas, pythonJson } from '../support/python.js';

const SPACING = 0.4;

/** Fields of noise with a known spectrum, made by numpy in the frequency domain; 1024² pixels of 0.4 mm. */
const FIELDS = `
import base64, json, sys, numpy as np
kind = sys.argv[1]
n, d = 1024, 0.4
f = np.hypot(*np.meshgrid(np.fft.fftfreq(n, d), np.fft.fftfreq(n, d)))
power = {
    'soft': lambda: 4e3 * f * np.where(f < 0.62, (0.5 + 0.5 * np.cos(np.pi * f / 0.62)) ** 2, 0),
    'sharp': lambda: 4e3 * f * np.where(f < 1.2, np.cos(np.pi * f / 2.4) ** 2, 0),
    'smoothed': lambda: 100 * np.exp(-4 * np.pi ** 2 * 0.5 ** 2 * f ** 2),
}[kind]()
rng = np.random.default_rng(11)
out = []
for _ in range(2):
    white = np.fft.fft2(rng.standard_normal((n, n)))
    field = np.fft.ifft2(white * np.sqrt(power) / d).real
    out.append(base64.b64encode(field.astype('<f4').tobytes()).decode())
print(json.dumps(out))
`;

/** ΣΣ of the autocovariance over all pairs of pixels, one by one, from the transform of a spectrum on 128². */
const PLAIN_SUM = `
import json, sys, numpy as np
given = json.loads(sys.argv[1])
n, (dx, dy) = 128, given['spacing']
f = np.hypot(*np.meshgrid(np.fft.fftfreq(n, dx), np.fft.fftfreq(n, dy)))
rings, values = np.array(given['rings']), np.array(given['values'])
power = np.where(f <= rings[-1], np.interp(f, rings, values), 0)
covariance = np.fft.ifft2(power).real / (dx * dy)
rows, columns = np.array(given['rows']), np.array(given['columns'])
pairs = covariance[(rows[:, None] - rows[None, :]) % n, (columns[:, None] - columns[None, :]) % n]
print(json.dumps(float(np.sqrt(pairs.sum()) / len(rows))))
`;

describe.skipIf(!pythonHas('numpy'))('The standard error of a mean, against numpy', () => {
  it.each([
    ['soft', 0.6],
    ['sharp', 0.93],
    ['smoothed', 0.7],
  ])(
    'covers 0 in 95 of 100 regions of %s noise whose mean is 0, where SD/√n does not',
    (kind, most) => {
      const [first, second] = (pythonJson(FIELDS, [kind]) as readonly string[]).map(fieldOf);
      if (first === undefined || second === undefined) throw new Error('no fields');
      const texture = textureOf(areasOf(first, 50), [SPACING, SPACING]);
      if (texture === undefined) throw new Error('no texture');
      let [covered, naive, count] = [0, 0, 0];
      for (let index = 0; index < 1000; index += 1) {
        // Half widths from 1 to 12 pixels, in a pattern over the field that has no period of its own.
        const radius = 1 + 11 * ((index * 0.618034) % 1) ** 2;
        const runs = disc(20 + ((index * 331.7) % 984), 20 + ((index * 167.3) % 984), radius);
        const values = runs.flatMap(({ row, from, end }) => [
          ...second.subarray(row * SIDE + from, row * SIDE + end),
        ]);
        const n = values.length;
        const mean = values.reduce((sum, value) => sum + value, 0) / n;
        const sd = Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (n - 1));
        const stated = standardErrorOfMean(runs, texture, [SPACING, SPACING], [0, 0, 0]) ?? 0;
        count += 1;
        if (Math.abs(mean) <= 1.96 * stated) covered += 1;
        if (Math.abs(mean) <= 1.96 * (sd / Math.sqrt(n))) naive += 1;
      }
      // 1,000 regions that lie on each other in part: the share itself is known to about ± 1 %.
      expect(covered / count).toBeGreaterThan(0.92);
      expect(covered / count).toBeLessThan(0.98);
      expect(naive / count).toBeLessThan(most);
    },
  );

  it('is the plain sum over all pairs of pixels of the transformed spectrum', () => {
    const texture: KernelTexture = {
      // So low that nothing is left for the corners beyond the last ring.
      noiseSdHu: 1e-3,
      areas: 4,
      frequencyPerMm: [0.02, 0.08, 0.16, 0.24, 0.4, 0.8],
      powerHu2Mm2: [20, 40, 90, 120, 60, 5],
      meanPerMm: 0.3,
      peakPerMm: 0.24,
      riseMm: null,
      blurFwhmMm: null,
    };
    const runs = [
      ...disc(60, 50, 7.3),
      { row: 70, from: 10, end: 14 },
      { row: 70, from: 20, end: 31 },
    ];
    const rows = runs.flatMap(({ row, from, end }) => new Array<number>(end - from).fill(row));
    const columns = runs.flatMap(({ from, end }) =>
      Array.from({ length: end - from }, (_, index) => from + index),
    );
    const plain = pythonJson(PLAIN_SUM, [
      JSON.stringify({
        spacing: [0.35, 0.5],
        rings: texture.frequencyPerMm,
        values: texture.powerHu2Mm2,
        rows,
        columns,
      }),
    ]) as number;
    expect(standardErrorOfMean(runs, texture, [0.35, 0.5], [0, 0, 0])).toBeCloseTo(plain, 9);
  });

  it.each(['soft', 'sharp', 'smoothed'])(
    'gives back the power that detrending takes from %s noise',
    (kind) => {
      const [field] = (pythonJson(FIELDS, [kind]) as readonly string[]).map(fieldOf);
      if (field === undefined) throw new Error('no field');
      const texture = textureOf(areasOf(field, 900), [SPACING, SPACING]);
      const known: Readonly<Record<string, (f: number) => number>> = {
        soft: (f) => 4e3 * f * (0.5 + 0.5 * Math.cos((Math.PI * f) / 0.62)) ** 2,
        sharp: (f) => 4e3 * f * Math.cos((Math.PI * f) / 2.4) ** 2,
        smoothed: (f) => 100 * Math.exp(-4 * Math.PI ** 2 * 0.25 * f * f),
      };
      const ratios = [0.08, 0.16, 0.24, 0.32].map((frequency) => {
        const at = texture?.frequencyPerMm.findIndex((f) => Math.abs(f - frequency) < 1e-9) ?? -1;
        return (texture?.powerHu2Mm2[at] ?? 0) / (known[kind]?.(frequency) ?? 1);
      });
      // The lowest ring is rather over- than understated; without that step it would be 0.5 of what is there.
      expect(ratios[0]).toBeGreaterThan(0.9);
      expect(ratios[0]).toBeLessThan(1.4);
      for (const ratio of ratios.slice(1)) expect(Math.abs(ratio - 1)).toBeLessThan(0.1);
    },
  );
});

const SIDE = 1024;

function fieldOf(text: string): Float32Array {
  const bytes = Buffer.from(text, 'base64');
  return new Float32Array(bytes.buffer, bytes.byteOffset, SIDE * SIDE);
}

/** Squares of 12 mm one beside the other, as the program takes them: detrended, their spectra on a lattice of 32². */
function areasOf(field: Float32Array, count: number): readonly TextureArea[] {
  const side = 30;
  return Array.from({ length: count }, (_, index) => {
    const [top, left] = [Math.floor(index / 34) * side, (index % 34) * side];
    const values = Float64Array.from(
      { length: side * side },
      (_, at) => field[(top + Math.floor(at / side)) * SIDE + left + (at % side)] ?? 0,
    );
    const rest = detrendQuadratic(values, side, side);
    const squares = rest.reduce((sum, value) => sum + value * value, 0);
    return {
      centreMm: [left * SPACING, top * SPACING, 0],
      meanHu: 0,
      sdHu: Math.sqrt(squares / (side * side - 6)),
      columns: side,
      rows: side,
      power: noisePower(rest, side, side, [SPACING, SPACING], [32, 32]),
    };
  });
}

function disc(column: number, row: number, radius: number): readonly PixelRun[] {
  const runs: PixelRun[] = [];
  for (let y = Math.ceil(row - radius); y <= row + radius; y += 1) {
    const half = Math.sqrt(radius ** 2 - (y - row) ** 2);
    const [from, end] = [Math.ceil(column - half), Math.floor(column + half) + 1];
    if (from < end) runs.push({ row: y, from, end });
  }
  return runs;
}
