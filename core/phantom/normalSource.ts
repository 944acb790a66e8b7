import type { UniformSource } from './uniformSource.js';

/** A source of standard normal numbers: the polar method (Marsaglia & Bray 1964, doi 10.1137/1006063). */
export function normalSource(uniform: UniformSource): () => number {
  let spare: number | undefined;
  return () => {
    if (spare !== undefined) {
      const kept = spare;
      spare = undefined;
      return kept;
    }
    for (;;) {
      const x = 2 * uniform() - 1;
      const y = 2 * uniform() - 1;
      const square = x * x + y * y;
      if (square > 0 && square < 1) {
        const factor = Math.sqrt((-2 * Math.log(square)) / square);
        spare = y * factor;
        return x * factor;
      }
    }
  };
}
