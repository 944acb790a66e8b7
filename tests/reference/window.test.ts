import { describe, expect, it } from 'vitest';
import type { VoiFunction } from '../../core/dicom/index.js';
import { windowed } from '../../core/intensity/index.js';

const at = (x: number, centre: number, width: number, voi: VoiFunction): number =>
  windowed(x, { centre, width, function: voi });

// PS3.3 2020a C.11.2.1.2.1, the worked examples of the Notes.
describe('the LINEAR examples of PS3.3 C.11.2.1.2.1', () => {
  it('c2048 w4096: ((x − 2047.5) / 4095 + 0.5) × 255', () => {
    expect(at(0, 2048, 4096, 'LINEAR')).toBe(0);
    expect(at(4096, 2048, 4096, 'LINEAR')).toBe(255);
    expect(at(1000, 2048, 4096, 'LINEAR')).toBeCloseTo(((1000 - 2047.5) / 4095 + 0.5) * 255, 12);
  });

  it('w1 is a threshold', () => {
    expect([2047, 2047.5, 2048].map((x) => at(x, 2048, 1, 'LINEAR'))).toEqual([0, 0, 255]);
    expect([-1, -0.5, 0].map((x) => at(x, 0, 1, 'LINEAR'))).toEqual([0, 0, 255]);
  });

  it('c0 w100: ((x + 0.5) / 99 + 0.5) × 255', () => {
    expect([at(-50, 0, 100, 'LINEAR'), at(50, 0, 100, 'LINEAR')]).toEqual([0, 255]);
    expect(at(-49, 0, 100, 'LINEAR')).toBeCloseTo(2.575758, 6);
    expect(at(0, 0, 100, 'LINEAR')).toBeCloseTo(128.787879, 6);
  });
});

// Computed with numpy and checked against pydicom 2.3.1 apply_windowing to 1e-6 for 40/400.
const VECTORS: readonly (readonly [number, number, number, number, number, number])[] = [
  [40, 400, -161, 0, 0, 30.130029],
  [40, 400, -160, 0, 0, 30.396745],
  [40, 400, -159, 0.639098, 0.6375, 30.6655],
  [40, 400, 0, 102.255639, 102, 102.334647],
  [40, 400, 40, 127.819549, 127.5, 127.5],
  [40, 400, 100, 166.165414, 165.75, 164.642358],
  [40, 400, 239, 255, 254.3625, 224.3345],
  [40, 400, 240, 255, 255, 224.603255],
  [300, 1500, -450, 0, 0, 30.396745],
  [300, 1500, -449, 0.170113, 0.17, 30.468213],
  [300, 1500, 0, 76.551034, 76.5, 79.056507],
  [300, 1500, 300, 127.585057, 127.5, 127.5],
  [300, 1500, 1049, 255, 254.83, 224.531787],
  [300, 800, -99, 0.319149, 0.31875, 30.530867],
  [300, 800, 0, 31.914894, 31.875, 46.518509],
  [300, 800, 699, 255, 254.68125, 224.469133],
];

describe('window functions against numpy', () => {
  it.each(VECTORS)('c%d w%d x%d', (centre, width, x, linear, exact, sigmoid) => {
    expect(at(x, centre, width, 'LINEAR')).toBeCloseTo(linear, 6);
    expect(at(x, centre, width, 'LINEAR_EXACT')).toBeCloseTo(exact, 6);
    expect(at(x, centre, width, 'SIGMOID')).toBeCloseTo(sigmoid, 6);
  });
});
