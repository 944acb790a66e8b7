import type { Vec3 } from '../geometry/index.js';

/** Half axes along u and v; u and v are unit vectors in the plane, by default the slice's row and column directions. */
export interface Ellipse {
  readonly kind: 'ellipse';
  readonly centreMm: Vec3;
  readonly u?: Vec3;
  readonly v?: Vec3;
  readonly radiiMm: readonly [number, number];
}

/** A closed polygon: the last point joins the first. */
export interface Outline {
  readonly kind: 'outline';
  readonly pointsMm: readonly Vec3[];
}

/** A region's shape on a plane in patient space, LPS, mm. */
export type Shape = Ellipse | Outline;
