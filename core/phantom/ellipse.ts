/** An ellipse of one slice in patient space, mm: x to the left, y to the back. */
export interface PhantomEllipse {
  readonly centreMm: readonly [number, number];
  /** Half axes. */
  readonly radiiMm: readonly [number, number];
  /** Turn of the first half axis, from +x towards +y. */
  readonly angleDeg: number;
}

/**
 * What all rays of one view have to know of an ellipse. A ray is the line x·cos θ + y·sin θ = t; places along it
 * are s = −x·sin θ + y·cos θ. With d = t − tCentre, the ray meets the ellipse when |d| < reach, over the half
 * length halfFactor·√(reach² − d²) around s = sCentre + d·slope.
 */
export interface EllipseView {
  readonly tCentre: number;
  readonly sCentre: number;
  readonly reach: number;
  readonly halfFactor: number;
  readonly slope: number;
}

/** Kak & Slaney 1988 eq. 3.4 ff: a′² = a²cos²(θ − φ) + b²sin²(θ − φ), chord 2ab·√(a′² − d²)/a′². */
export function viewOfEllipse(
  { centreMm: [x, y], radiiMm: [a, b], angleDeg }: PhantomEllipse,
  thetaRad: number,
): EllipseView {
  const cosine = Math.cos(thetaRad);
  const sine = Math.sin(thetaRad);
  const turn = thetaRad - (angleDeg * Math.PI) / 180;
  const u = Math.cos(turn);
  const v = Math.sin(turn);
  const square = a * a * u * u + b * b * v * v;
  return {
    tCentre: x * cosine + y * sine,
    sCentre: -x * sine + y * cosine,
    reach: Math.sqrt(square),
    halfFactor: (a * b) / square,
    slope: (-u * v * (a * a - b * b)) / square,
  };
}

/** Length of the ray (θ, t) inside the ellipse, mm; 0 beside it. */
export function chordMm(ellipse: PhantomEllipse, thetaRad: number, tMm: number): number {
  const { tCentre, reach, halfFactor } = viewOfEllipse(ellipse, thetaRad);
  const d = tMm - tCentre;
  return 2 * halfFactor * Math.sqrt(Math.max(0, reach * reach - d * d));
}

/** Whether a place lies inside the ellipse, its edge included. */
export function insideEllipse(
  { centreMm, radiiMm, angleDeg }: PhantomEllipse,
  xMm: number,
  yMm: number,
): boolean {
  const angle = (angleDeg * Math.PI) / 180;
  const dx = xMm - centreMm[0];
  const dy = yMm - centreMm[1];
  const along = (dx * Math.cos(angle) + dy * Math.sin(angle)) / radiiMm[0];
  const across = (dy * Math.cos(angle) - dx * Math.sin(angle)) / radiiMm[1];
  return along * along + across * across <= 1;
}
