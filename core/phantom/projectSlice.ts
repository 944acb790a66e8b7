import { collectRays, gaussianAperture } from './aperture.js';
import { detectorMm, type ParallelScan, type Sinogram, viewAngleRad } from './parallelScan.js';
import { projectInsets, projectSmallInsets } from './projectInsets.js';
import { projectPainted } from './projectPainted.js';
import type { Inset, SceneSlice } from './scene.js';

/** Rays to a detector pitch: large tissues are smooth, struts are thinner than a pitch. */
const LARGE_RAYS = 2;
const SMALL_RAYS = 8;
const SMALL_MM = 4;

/**
 * The noiseless line integrals of a slice, dimensionless (attenuation × mm). Many rays per detector are averaged
 * with the Gaussian of focal spot and detector. The average is taken of the line integrals, not of the photons,
 * so that the whole chain stays linear and the blur in the image is that Gaussian exactly.
 */
export function projectSlice(slice: SceneSlice, scan: ParallelScan): Sinogram {
  const { views, detectors, pitchMm, blurSigmaMm } = scan;
  const sinogram = new Float64Array(views * detectors);
  const small = slice.insets.filter(isSmall);
  const large = slice.insets.filter((inset) => !isSmall(inset));
  const coarse = gaussianAperture(detectors, pitchMm, blurSigmaMm, LARGE_RAYS);
  const fine = gaussianAperture(detectors, pitchMm, blurSigmaMm, SMALL_RAYS);
  const coarseRays = new Float64Array(coarse.count);
  const fineRays = new Float64Array(fine.count);
  const coarseFirst = detectorMm(scan, 0) + coarse.first * pitchMm;
  const fineFirst = detectorMm(scan, 0) + fine.first * pitchMm;
  for (let view = 0; view < views; view += 1) {
    const theta = viewAngleRad(scan, view);
    const row = sinogram.subarray(view * detectors, (view + 1) * detectors);
    const coarseStep = pitchMm / LARGE_RAYS;
    projectPainted(slice.painted, theta, coarseFirst, coarseStep, coarseRays);
    projectInsets(large, theta, coarseFirst, coarseStep, coarseRays);
    collectRays(coarse, coarseRays, { from: 0, to: coarse.count }, row);
    const touched = projectSmallInsets(small, theta, fineFirst, pitchMm / SMALL_RAYS, fineRays);
    collectRays(fine, fineRays, touched, row);
    fineRays.fill(0, touched.from, touched.to);
  }
  return sinogram.map((relative) => relative * scan.waterPerMm);
}

function isSmall({ radiiMm }: Inset): boolean {
  return Math.min(...radiiMm) < SMALL_MM;
}
