import type { ImageGrid } from '../imageGrid.js';
import type { Kernel } from '../kernel.js';
import type { ParallelScan } from '../parallelScan.js';

/** Raised whenever the same inputs no longer give the same files. */
export const DEMONSTRATION_VERSION = 1;

/** Slices that the scene has; fewer may be asked for. */
export const MOST_SLICES = 44;
export const SLICE_SPACING_MM = 0.5;
export const SLICE_THICKNESS_MM = 0.6;
export const KVP = 100;
export const PHASE_PERCENT = 75;

/** Water at the mean energy of a 100 kVp beam, about 60 keV: 0.2059 cm²/g (xraylib 4.0, NIST compound list). */
const WATER_PER_MM = 0.02059;

/**
 * An invented scanner. The pitch keeps the sharp kernel's frequencies below the detectors' own limit of 1.43 /mm;
 * 720 views keep the field of view free of view aliasing up to 95 mm from an edge.
 */
export const SCAN: ParallelScan = {
  views: 720,
  detectors: 1024,
  pitchMm: 0.35,
  blurSigmaMm: 0.18,
  waterPerMm: WATER_PER_MM,
};

/** Photons that reach a detector through air, in one view of one slice. */
export const PHOTONS_PER_RAY = 1.6e5;

/** The field of view, around the heart. */
export const FIELD_OF_VIEW_MM = 200;
export const CENTRE_MM: readonly [number, number] = [24, -14];

export type Side = 'soft' | 'sharp';
export const SIDES: readonly Side[] = ['soft', 'sharp'];

/** The two reconstructions of the one noisy acquisition. */
export const KERNELS: Readonly<Record<Side, Kernel & { readonly label: string }>> = {
  soft: { apodisation: 'hann', cutOffPerMm: 0.62, label: 'Quiet 2' },
  sharp: { apodisation: 'cosine', cutOffPerMm: 1.26, label: 'Crisp 5' },
};

/** What may be chosen of the demonstration. The same choice gives the same bytes. */
export interface DemonstrationOptions {
  readonly seed: number;
  readonly slices: number;
  readonly matrix: number;
}

export const DEFAULT_DEMONSTRATION: DemonstrationOptions = {
  seed: 1,
  slices: MOST_SLICES,
  matrix: 512,
};

/** Throws for a choice that the scene can't give. */
export function checkOptions({ seed, slices, matrix }: DemonstrationOptions): void {
  if (!Number.isInteger(seed)) throw new RangeError(`invalid seed: ${seed}`);
  if (!Number.isInteger(slices) || slices < 1 || slices > MOST_SLICES)
    throw new RangeError(`invalid number of slices: ${slices}`);
  if (!Number.isInteger(matrix) || matrix < 32 || matrix > 1024)
    throw new RangeError(`invalid matrix: ${matrix}`);
}

/** Where slice 0 … slices − 1 lies, mm. Fewer slices than the scene has are taken around the middle of the stent. */
export function sliceZMm(slices: number, index: number): number {
  const middle = 20;
  const first = Math.min(Math.max(0, middle - Math.floor(slices / 2)), MOST_SLICES - slices);
  return (first + index) * SLICE_SPACING_MM;
}

/** The grid of both reconstructions. */
export function demonstrationGrid(matrix: number): ImageGrid {
  return { centreMm: CENTRE_MM, fieldOfViewMm: FIELD_OF_VIEW_MM, matrix };
}
