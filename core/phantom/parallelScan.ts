/** A parallel-beam acquisition: views evenly over 180°, detectors evenly around the axis x = y = 0. */
export interface ParallelScan {
  readonly views: number;
  readonly detectors: number;
  readonly pitchMm: number;
  /** Blur of focal spot and detector together: one Gaussian along the detector, standard deviation. */
  readonly blurSigmaMm: number;
  /** Linear attenuation coefficient of water. */
  readonly waterPerMm: number;
}

/** Line integrals, one row of detectors after the other. */
export type Sinogram = Float64Array;

/** Angle of a view. */
export function viewAngleRad(scan: ParallelScan, view: number): number {
  return (Math.PI * view) / scan.views;
}

/** Place of a detector's centre on the axis t. */
export function detectorMm(scan: ParallelScan, detector: number): number {
  return (detector - (scan.detectors - 1) / 2) * scan.pitchMm;
}
