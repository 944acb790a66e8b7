import {
  backProject,
  filterSinogram,
  firstPixelMm,
  type ImageGrid,
  type ParallelScan,
  pixelMm,
  type Sinogram,
} from '../../../core/phantom/index.js';

/** How an algebraic reconstruction smooths. */
export interface AlgebraicRecipe {
  /** Passes over all views. */
  readonly passes: number;
  /** Differences of neighbours well beyond this are edges, and are kept, HU. */
  readonly edgeHu: number;
  /** Part of a difference that is taken away in one step. */
  readonly smoothing: number;
}

const SUBSETS = 8;
const RELAXATION = 0.5;
const SMOOTHING_STEPS = 1;

/**
 * Simultaneous algebraic reconstruction with ordered subsets (Andersen & Kak 1984, doi 10.1016/0161-7346(84)90008-7) from a
 * filtered back projection, each subset followed by a step of edge-preserving smoothing (Perona & Malik 1990, doi
 * 10.1109/34.56205): what is not linear. The grid holds the whole body. HU, row after row.
 */
export function algebraicHu(
  sinogram: Sinogram,
  scan: ParallelScan,
  grid: ImageGrid,
  { passes, edgeHu, smoothing }: AlgebraicRecipe,
): Float64Array {
  const start = { apodisation: 'hann', cutOffPerMm: 1 } as const;
  const image = backProject(filterSinogram(sinogram, scan, start), scan, grid);
  const perHu = scan.waterPerMm / 1000;
  for (let pass = 0; pass < passes; pass += 1)
    for (let subset = 0; subset < SUBSETS; subset += 1) {
      const views = Array.from(
        { length: Math.floor((scan.views - subset - 1) / SUBSETS) + 1 },
        (_, index) => subset + index * SUBSETS,
      );
      correct(image, sinogram, scan, grid, views);
      for (let step = 0; step < SMOOTHING_STEPS; step += 1)
        smooth(image, grid.matrix, edgeHu * perHu, smoothing);
    }
  return image.map((attenuation) => attenuation / perHu - 1000);
}

/** Adds to each pixel the mean of what its rays of some views lack, spread over their length in the image. */
function correct(
  image: Float64Array,
  sinogram: Sinogram,
  scan: ParallelScan,
  grid: ImageGrid,
  views: readonly number[],
): void {
  const { matrix } = grid;
  const { detectors } = scan;
  const change = new Float64Array(image.length);
  const [firstX, firstY] = firstPixelMm(grid);
  const step = pixelMm(grid);
  for (const view of views) {
    const lacking = new Float64Array(detectors);
    const angle = (Math.PI * view) / scan.views;
    const [c, s] = [Math.cos(angle), Math.sin(angle)];
    for (let detector = 0; detector < detectors; detector += 1) {
      const t = (detector - (detectors - 1) / 2) * scan.pitchMm;
      const { sum, lengthMm } = alongRay(image, matrix, step, firstX, firstY, c, s, t);
      lacking[detector] =
        lengthMm > 0 ? ((sinogram[view * detectors + detector] as number) - sum) / lengthMm : 0;
    }
    for (let y = 0; y < matrix; y += 1)
      for (let x = 0; x < matrix; x += 1) {
        const t = (firstX + x * step) * c + (firstY + y * step) * s;
        const place = t / scan.pitchMm + (detectors - 1) / 2;
        const left = Math.floor(place);
        if (left < 0 || left + 1 >= detectors) continue;
        const part = place - left;
        const pixel = y * matrix + x;
        change[pixel] =
          (change[pixel] as number) +
          (1 - part) * (lacking[left] as number) +
          part * (lacking[left + 1] as number);
      }
  }
  const scale = RELAXATION / views.length;
  for (let pixel = 0; pixel < image.length; pixel += 1)
    image[pixel] = (image[pixel] as number) + scale * (change[pixel] as number);
}

/** Line integral through an image and its length in it, step by step along the steeper axis (Joseph 1982). */
function alongRay(
  image: Float64Array,
  matrix: number,
  step: number,
  firstX: number,
  firstY: number,
  c: number,
  s: number,
  t: number,
): { readonly sum: number; readonly lengthMm: number } {
  const isSteep = Math.abs(c) >= Math.abs(s);
  const [over, along] = isSteep ? [c, s] : [s, c];
  const [firstOver, firstAlong] = isSteep ? [firstX, firstY] : [firstY, firstX];
  const lengthMm = step / Math.abs(over);
  let [sum, count] = [0, 0];
  for (let index = 0; index < matrix; index += 1) {
    const place = ((t - (firstAlong + index * step) * along) / over - firstOver) / step;
    const below = Math.floor(place);
    if (below < 0 || below + 1 >= matrix) continue;
    const part = place - below;
    const pixel = isSteep ? index * matrix + below : below * matrix + index;
    const next = isSteep ? pixel + 1 : pixel + matrix;
    sum += (1 - part) * (image[pixel] as number) + part * (image[next] as number);
    count += 1;
  }
  return { sum: sum * lengthMm, lengthMm: count * lengthMm };
}

/** One step of diffusion that small differences take part in, and edges hardly. */
function smooth(image: Float64Array, matrix: number, edge: number, strength: number): void {
  const before = image.slice();
  const pull = (difference: number): number => difference * Math.exp(-((difference / edge) ** 2));
  for (let y = 1; y < matrix - 1; y += 1)
    for (let x = 1; x < matrix - 1; x += 1) {
      const pixel = y * matrix + x;
      const own = before[pixel] as number;
      const sum =
        pull((before[pixel - 1] as number) - own) +
        pull((before[pixel + 1] as number) - own) +
        pull((before[pixel - matrix] as number) - own) +
        pull((before[pixel + matrix] as number) - own);
      image[pixel] = own + (strength / 4) * sum;
    }
}
