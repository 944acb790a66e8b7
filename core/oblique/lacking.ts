import { isInside } from './inLayer.js';
import type { Layer, PlaneInStack } from './layers.js';

/** Positions are rounded in files: a place this near to a slice lies on it where there is nothing to mix it with, mm. */
const ON_SLICE_MM = 1e-3;

/** The slice on which a height lies, of the one below it and the next; undefined between slices. */
export function onSlice(
  layers: readonly Layer[],
  below: number,
  alongMm: number,
): number | undefined {
  if (Math.abs(alongMm - (layers[below]?.alongMm ?? Infinity)) <= ON_SLICE_MM) return below;
  const next = below + 1;
  if (Math.abs(alongMm - (layers[next]?.alongMm ?? Infinity)) <= ON_SLICE_MM) return next;
  return undefined;
}

/**
 * Notes which slices a place would have needed, so that they can be read and the cut made again. A gap lacks nothing: its
 * slices do not exist.
 *
 * @param index the slice that the place lies on, where it lies on one
 * @param x column beside a layer's own, y row
 */
export function noteLacking(
  { layers, columns, rows, isNext }: PlaneInStack,
  below: number,
  index: number | undefined,
  x: number,
  y: number,
  lacking: Uint8Array,
): void {
  if (index === undefined && isNext[below] !== true) return;
  const layer = layers[index ?? below];
  if (layer === undefined) return;
  if (!isInside(x + layer.column, columns) || !isInside(y + layer.row, rows)) return;
  if (index !== undefined) {
    lacking[index] = 1;
    return;
  }
  if (layer.stored === undefined) lacking[below] = 1;
  if (layers[below + 1]?.stored === undefined) lacking[below + 1] = 1;
}
