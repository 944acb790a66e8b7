import { describe, expect, it } from 'vitest';
import {
  normalSource,
  poissonSource,
  seededUniform,
  xoshiro128,
} from '../../../../core/phantom/index.js';

const moments = (values: readonly number[]): { mean: number; variance: number } => {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  const variance =
    values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (values.length - 1);
  return { mean, variance };
};

describe('xoshiro128', () => {
  it('gives the numbers of the authors’ C program', () => {
    // State and outputs as printed from the reference C program in edorfaus/xoshiro-6502, test-rom/testdata.asm.
    const next = xoshiro128([0x964d4a0c, 0xd40ab895, 0xad7fdecb, 0x3006f0f0]);
    expect([next(), next(), next(), next()]).toEqual([
      0xf1391922, 0x6fe53806, 0xa5be2840, 0xf510ee70,
    ]);
  });

  it('refuses the state of zeros', () => {
    expect(() => xoshiro128([0, 0, 0, 0])).toThrow('invalid generator state');
  });
});

describe('seededUniform', () => {
  it('is the same for the same numbers and unlike for neighbouring ones', () => {
    const first = (...numbers: readonly number[]): number => seededUniform(...numbers)();
    expect(first(1, 2)).toBe(first(1, 2));
    expect(new Set([first(1, 2), first(1, 3), first(2, 2), first(2, 1), first(0, 0)]).size).toBe(5);
  });

  it('has the mean 1/2 and the variance 1/12 of the uniform distribution', () => {
    const uniform = seededUniform(7);
    const { mean, variance } = moments(Array.from({ length: 40_000 }, uniform));
    // Four standard errors: 0.2887/√n = 0.00144, and √(1/180)/√n = 0.00037.
    expect(Math.abs(mean - 0.5)).toBeLessThan(0.0058);
    expect(Math.abs(variance - 1 / 12)).toBeLessThan(0.0015);
  });
});

describe('normalSource', () => {
  it('has mean 0, variance 1 and 68.27 % within one standard deviation', () => {
    const normal = normalSource(seededUniform(11));
    const values = Array.from({ length: 40_000 }, normal);
    const { mean, variance } = moments(values);
    expect(Math.abs(mean)).toBeLessThan(0.02);
    expect(Math.abs(variance - 1)).toBeLessThan(0.03);
    const within = values.filter((value) => Math.abs(value) < 1).length / values.length;
    expect(Math.abs(within - 0.6827)).toBeLessThan(0.01);
  });
});

describe('poissonSource', () => {
  it.each([0.3, 5, 12, 40, 900, 1999, 2000, 50_000])(
    'has mean and variance %d, by whichever method',
    (expected) => {
      const poisson = poissonSource(seededUniform(3, Math.round(expected * 10)));
      const values = Array.from({ length: 20_000 }, () => poisson(expected));
      const { mean, variance } = moments(values);
      expect(values.every((value) => Number.isInteger(value) && value >= 0)).toBe(true);
      // Five standard errors: √(λ/n) for the mean, √((2λ² + λ)/n) for the variance.
      expect(Math.abs(mean - expected)).toBeLessThan(5 * Math.sqrt(expected / 20_000));
      expect(Math.abs(variance - expected)).toBeLessThan(
        5 * Math.sqrt((2 * expected * expected + expected) / 20_000),
      );
    },
  );

  it('gives each count of a small mean as often as e^−λ λ^k/k! says', () => {
    const poisson = poissonSource(seededUniform(5));
    const n = 30_000;
    const seen = new Array<number>(40).fill(0);
    for (let index = 0; index < n; index += 1) {
      const count = poisson(14);
      seen[count] = (seen[count] ?? 0) + 1;
    }
    let probability = Math.exp(-14);
    for (let k = 1; k < 30; k += 1) {
      probability *= 14 / k;
      const error = Math.sqrt((probability * (1 - probability)) / n);
      expect(Math.abs((seen[k] ?? 0) / n - probability)).toBeLessThan(5 * error + 1 / n);
    }
  });

  it('gives 0 for a mean of 0 and throws for no mean', () => {
    const poisson = poissonSource(seededUniform(1));
    expect(poisson(0)).toBe(0);
    expect(() => poisson(-1)).toThrow('invalid mean count: -1');
    expect(() => poisson(Number.NaN)).toThrow('invalid mean count: NaN');
  });
});
