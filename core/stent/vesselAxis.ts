/** The axis of a vessel in the frame of the start: place at height 0, and drift per mm of height. */
export interface VesselAxis {
  readonly centre: readonly [number, number];
  readonly drift: readonly [number, number];
}

/** Where the axis meets a height. */
export function axisAt({ centre, drift }: VesselAxis, zMm: number): readonly [number, number] {
  return [centre[0] + zMm * drift[0], centre[1] + zMm * drift[1]];
}

/** Angle between the axis and the normal of the slices. */
export function tiltDegOf({ drift }: VesselAxis): number {
  return (Math.atan(Math.hypot(...drift)) * 180) / Math.PI;
}

/**
 * Distance from the axis, at right angles to it, of places in a slice: along the drift a slice cuts a tube longer, by
 * 1/cos of the tilt.
 */
export function distanceFrom(axis: VesselAxis): (du: number, dv: number) => number {
  const slope = Math.hypot(...axis.drift);
  if (slope === 0) return (du, dv) => Math.sqrt(du * du + dv * dv);
  const [a, b] = [axis.drift[0] / slope, axis.drift[1] / slope];
  const cosine = 1 / Math.sqrt(1 + slope * slope);
  return (du, dv) => {
    const along = (du * a + dv * b) * cosine;
    const beside = dv * a - du * b;
    return Math.sqrt(along * along + beside * beside);
  };
}

/** Straight line through centres at heights, by least squares; one height alone has no drift. */
export function fitAxis(
  points: readonly { readonly zMm: number; readonly at: readonly [number, number] }[],
): VesselAxis {
  const n = points.length;
  const meanZ = points.reduce((sum, { zMm }) => sum + zMm, 0) / n;
  const spread = points.reduce((sum, { zMm }) => sum + (zMm - meanZ) ** 2, 0);
  const line = (axis: 0 | 1): readonly [number, number] => {
    const mean = points.reduce((sum, { at }) => sum + at[axis], 0) / n;
    const slope =
      spread > 1e-6
        ? points.reduce((sum, { zMm, at }) => sum + (zMm - meanZ) * (at[axis] - mean), 0) / spread
        : 0;
    return [mean - slope * meanZ, slope];
  };
  const [u, v] = [line(0), line(1)];
  return { centre: [u[0], v[0]], drift: [u[1], v[1]] };
}
