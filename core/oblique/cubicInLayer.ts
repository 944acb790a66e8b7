import { evenWeights } from './cubicWeights.js';
import { isInside, snapped } from './inLayer.js';
import { imageHu, type Layer } from './layers.js';

/** HU of a slice at a place, given beside the slice's own first place; NaN where there is none. */
export type ReadLayer = (layer: Layer, x: number, y: number) => number;

/**
 * A reader of slices by cubic convolution over four by four pixels. It keeps the weights of the last place, which slices
 * that lie above one another share.
 */
export function createCubicLayer(columns: number, rows: number): ReadLayer {
  const across = new Float64Array(4);
  const down = new Float64Array(4);
  let [lastX, lastY] = [Number.NaN, Number.NaN];
  let [left, top] = [0, 0];
  let isWhole = false;
  return (layer, beside, over) => {
    const { stored, surelyFrom } = layer;
    const x = beside + layer.column;
    const y = over + layer.row;
    if (stored === undefined || !isInside(x, columns) || !isInside(y, rows)) return Number.NaN;
    if (x !== lastX || y !== lastY) {
      lastX = x;
      lastY = y;
      left = firstOf(x, columns);
      top = firstOf(y, rows);
      evenWeights(snapped(x - left - 1), across);
      evenWeights(snapped(y - top - 1), down);
      isWhole = left >= 0 && top >= 0 && left + 3 < columns && top + 3 < rows;
    }
    if (!isWhole) return careful(layer, left, top, columns, rows, across, down);
    let sum = 0;
    let least = 0;
    const [w0, w1, w2, w3] = [
      across[0] as number,
      across[1] as number,
      across[2] as number,
      across[3] as number,
    ];
    for (let line = 0; line < 4; line++) {
      const p = (top + line) * columns + left;
      const a = stored[p] as number;
      const b = stored[p + 1] as number;
      const c = stored[p + 2] as number;
      const d = stored[p + 3] as number;
      least |= (a - surelyFrom) | (b - surelyFrom) | (c - surelyFrom) | (d - surelyFrom);
      sum += (down[line] as number) * (a * w0 + b * w1 + c * w2 + d * w3);
    }
    return least >= 0
      ? sum * layer.slope + layer.intercept
      : careful(layer, left, top, columns, rows, across, down);
  };
}

/** The first of the four pixels around a place. The last pixel is reached from the one before it, which then has no weight. */
function firstOf(place: number, count: number): number {
  return Math.min(count - 2, Math.max(0, Math.floor(place))) - 1;
}

/** Asks each pixel that has a weight, and only those. */
function careful(
  layer: Layer,
  left: number,
  top: number,
  columns: number,
  rows: number,
  across: Float64Array,
  down: Float64Array,
): number {
  let sum = 0;
  for (let line = 0; line < 4; line++) {
    const weight = down[line] as number;
    const row = top + line;
    if (weight === 0) continue;
    if (row < 0 || row >= rows) return Number.NaN;
    for (let one = 0; one < 4; one++) {
      const share = across[one] as number;
      const column = left + one;
      if (share === 0) continue;
      if (column < 0 || column >= columns) return Number.NaN;
      sum += weight * share * imageHu(layer.stored?.[row * columns + column] ?? Number.NaN, layer);
    }
  }
  return sum;
}
