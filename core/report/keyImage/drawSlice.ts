import type { CtImage, StoredValues, VoiWindow } from '../../dicom/index.js';
import { isPadding, NO_DATA_GREY, rescaled, windowed } from '../../intensity/index.js';
import type { Raster } from '../../raster/index.js';
import { type PlateField, pixelAt } from './plateField.js';

/** Grey of the ground beside the image. */
const BESIDE_GREY = 0;

/**
 * Draws a piece of a slice: HU between the four pixels around each place (bilinear), then the window as PS3.3
 * C.11.2.1 states it. A place beside padding is drawn as no data: padding is mixed with nothing.
 */
export function drawSlice(
  raster: Raster,
  field: PlateField,
  image: Pick<CtImage, 'pixels' | 'grid'>,
  stored: StoredValues,
  window: VoiWindow,
): void {
  const { sidePx, left, top } = field;
  const turned = image.pixels.photometric === 'MONOCHROME1';
  for (let y = top; y < top + sidePx; y += 1) {
    for (let x = left; x < left + sidePx; x += 1) {
      const value = valueAt(field, image, stored, x, y);
      const grey = typeof value === 'number' ? Math.round(windowed(value, window)) : undefined;
      const level =
        grey === undefined
          ? value === 'padding'
            ? NO_DATA_GREY
            : BESIDE_GREY
          : turned
            ? 255 - grey
            : grey;
      raster.rgb.fill(level, (y * raster.width + x) * 3, (y * raster.width + x) * 3 + 3);
    }
  }
}

function valueAt(
  field: PlateField,
  { pixels, grid }: Pick<CtImage, 'pixels' | 'grid'>,
  stored: StoredValues,
  x: number,
  y: number,
): number | 'padding' | 'beside' {
  const { column, row } = pixelAt(field, x, y);
  if (column < -0.5 || row < -0.5 || column > grid.columns - 0.5 || row > grid.rows - 0.5) {
    return 'beside';
  }
  const c = Math.min(Math.max(column, 0), grid.columns - 1);
  const r = Math.min(Math.max(row, 0), grid.rows - 1);
  const c0 = Math.min(Math.floor(c), Math.max(0, grid.columns - 2));
  const r0 = Math.min(Math.floor(r), Math.max(0, grid.rows - 2));
  let sum = 0;
  for (const [dc, dr] of CORNERS) {
    const weight = (dc === 0 ? 1 - (c - c0) : c - c0) * (dr === 0 ? 1 - (r - r0) : r - r0);
    if (weight === 0) continue;
    const value = stored[(r0 + dr) * grid.columns + c0 + dc] as number;
    if (isPadding(value, pixels)) return 'padding';
    sum += weight * rescaled(value, pixels);
  }
  return sum;
}

const CORNERS = [
  [0, 0],
  [1, 0],
  [0, 1],
  [1, 1],
] as const;
