import { dot, gridNormal } from '../geometry/index.js';
import type { Stack } from '../stack/index.js';

/** Cosine of the angle between two normals above which slices count as parallel: 0.26°. */
const PARALLEL = 1 - 1e-5;

/** A span along the normal of a stack, mm. */
export interface Span {
  readonly fromMm: number;
  readonly toMm: number;
}

/** From the first slice of a stack to its last one. */
export function spanOf({ slices }: Stack): Span {
  const last = slices[slices.length - 1] ?? slices[0];
  return { fromMm: slices[0].alongMm, toMm: last.alongMm };
}

/** Whether the slices of two stacks face the same way. */
export function areParallel(a: Stack, b: Stack): boolean {
  return dot(gridNormal(a.slices[0].image.grid), gridNormal(b.slices[0].image.grid)) > PARALLEL;
}

/** What two parallel stacks have in common along their normal; undefined where they have nothing. */
export function commonRange(a: Stack, b: Stack): Span | undefined {
  if (!areParallel(a, b)) return undefined;
  const [x, y] = [spanOf(a), spanOf(b)];
  const common = { fromMm: Math.max(x.fromMm, y.fromMm), toMm: Math.min(x.toMm, y.toMm) };
  return common.toMm >= common.fromMm ? common : undefined;
}
