import { describe, expect, it } from 'vitest';
import { detrendQuadratic } from '../../../../core/quality/index.js';

const surface = (columns: number, rows: number): Float64Array =>
  Float64Array.from({ length: columns * rows }, (_, index) => {
    const x = index % columns;
    const y = Math.floor(index / columns);
    return 300 + 2 * x - 3 * y + 0.5 * x * y - 0.25 * x * x + 0.125 * y * y;
  });

describe('detrendQuadratic', () => {
  it('leaves nothing of a second-order surface, on oblong areas too', () => {
    for (const [columns, rows] of [
      [8, 8],
      [7, 4],
      [3, 3],
    ] as const)
      for (const rest of detrendQuadratic(surface(columns, rows), columns, rows))
        expect(Math.abs(rest)).toBeLessThan(1e-10);
  });

  it('leaves what is at right angles to it untouched', () => {
    // A third-order wave with no part in 1, x, x²: the orthogonal polynomial of degree 3 over 5 points.
    const cubic = [-1, 2, 0, -2, 1];
    const values = Float64Array.from({ length: 15 }, (_, index) => cubic[index % 5] ?? 0);
    detrendQuadratic(values, 5, 3).forEach((rest, index) => {
      expect(rest).toBeCloseTo(cubic[index % 5] ?? 0, 12);
    });
  });

  it('does not change the values it was given', () => {
    const values = surface(4, 4);
    detrendQuadratic(values, 4, 4);
    expect([...values]).toEqual([...surface(4, 4)]);
  });

  it('is defined for sides of one and two', () => {
    expect([...detrendQuadratic(Float64Array.of(5), 1, 1)]).toEqual([0]);
    expect([...detrendQuadratic(Float64Array.of(1, 2, 4, 9), 2, 2)]).toEqual([0, 0, 0, 0]);
  });

  it('throws for values that are no such rectangle', () => {
    expect(() => detrendQuadratic(new Float64Array(5), 2, 2)).toThrow(
      'invalid rectangle: 5 values',
    );
  });
});
