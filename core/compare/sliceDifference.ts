import type { PixelEncoding, StoredValues } from '../dicom/index.js';
import type { SliceGrid } from '../geometry/index.js';
import { type LatticeMap, latticeMap } from './latticeMap.js';

/** One slice with its pixels, as it is compared. */
export interface ComparedSlice {
  readonly grid: SliceGrid;
  readonly pixels: PixelEncoding;
  readonly stored: StoredValues;
}

/** Difference of two slices, for looking at and never for measuring. */
export interface SliceDifference {
  /** Sharp − soft, HU, row after row; NaN where one of the two has no data. */
  readonly hu: Float32Array;
  /** Whether the grids do not fall together, so that the coarser slice was interpolated between its pixels. */
  readonly interpolated: boolean;
}

/** Which of two slices carries their difference: the one of the finer pixels, the soft one when both are as fine. */
export function finerSlice(soft: SliceGrid, sharp: SliceGrid): 'soft' | 'sharp' {
  const area = ({ pixelSpacingMm: [row, column] }: SliceGrid): number => row * column;
  return area(sharp) < area(soft) * (1 - 1e-4) ? 'sharp' : 'soft';
}

/**
 * Sharp − soft in HU on the pixels of the finer slice ({@link finerSlice}); the other one is interpolated bilinearly
 * in its plane, and not at all where its pixels lie on those of the finer one. No data where either holds padding,
 * where a needed neighbour does, and outside of either. Nothing is interpolated across slices: the caller picks the
 * nearest ones. Undefined for slices that are turned against each other or whose values are not HU.
 */
export function sliceDifference(
  soft: ComparedSlice,
  sharp: ComparedSlice,
): SliceDifference | undefined {
  if (soft.pixels.unit !== 'HU' || sharp.pixels.unit !== 'HU') return undefined;
  const isSoftFiner = finerSlice(soft.grid, sharp.grid) === 'soft';
  const [fine, other] = isSoftFiner ? [soft, sharp] : [sharp, soft];
  const map = latticeMap(fine.grid, other.grid);
  if (map === undefined) return undefined;
  const sign = isSoftFiner ? 1 : -1;
  if (isSameLattice(map)) return { hu: pixelByPixel(fine, other, map, sign), interpolated: false };
  const { rows, columns } = fine.grid;
  const hu = new Float32Array(rows * columns);
  const ownHu = huOf(fine);
  const otherHu = huOf(other);
  const across = placesOf(map.columnStep, map.columnOffset, columns, other.grid.columns);
  const down = placesOf(map.rowStep, map.rowOffset, rows, other.grid.rows);
  for (let row = 0; row < rows; row++) {
    const above = (down.first[row] as number) * other.grid.columns;
    const below = (down.second[row] as number) * other.grid.columns;
    const low = down.part[row] as number;
    for (let column = 0; column < columns; column++) {
      const at = row * columns + column;
      const right = across.part[column] as number;
      const a = above + (across.first[column] as number);
      let value = otherHu[a] as number;
      if (right !== 0 || low !== 0) {
        const b = above + (across.second[column] as number);
        const c = below + (across.first[column] as number);
        const d = below + (across.second[column] as number);
        const upper = mixed(value, otherHu[b] as number, right);
        const lower = mixed(otherHu[c] as number, otherHu[d] as number, right);
        value = mixed(upper, lower, low);
      }
      hu[at] = sign * (value - (ownHu[at] as number));
    }
  }
  return { hu, interpolated: !isWhole(map) };
}

function isSameLattice(map: LatticeMap): boolean {
  return isWhole(map) && map.columnStep === 1 && map.rowStep === 1;
}

/** Pixels that fall together are subtracted as they are: this is the usual case, and scrolling waits for it. */
function pixelByPixel(
  fine: ComparedSlice,
  other: ComparedSlice,
  { columnOffset, rowOffset }: LatticeMap,
  sign: number,
): Float32Array {
  const { rows, columns } = fine.grid;
  const hu = new Float32Array(rows * columns).fill(Number.NaN);
  const a = conversionOf(fine);
  const b = conversionOf(other);
  const [firstRow, lastRow] = [
    Math.max(0, -rowOffset),
    Math.min(rows, other.grid.rows - rowOffset),
  ];
  const firstColumn = Math.max(0, -columnOffset);
  const lastColumn = Math.min(columns, other.grid.columns - columnOffset);
  for (let row = firstRow; row < lastRow; row++) {
    const shift = (row + rowOffset) * other.grid.columns + columnOffset - row * columns;
    for (let at = row * columns + firstColumn; at < row * columns + lastColumn; at++) {
      const own = fine.stored[at] as number;
      const its = other.stored[at + shift] as number;
      if ((own >= a.low && own <= a.high) || (its >= b.low && its <= b.high)) continue;
      hu[at] = sign * (its * b.slope + b.intercept - (own * a.slope + a.intercept));
    }
  }
  return hu;
}

/** Rescale and padding of a slice; without padding a range that holds nothing (PS3.3 C.11.1, C.7.5.1.1.2). */
function conversionOf({ pixels }: ComparedSlice) {
  const { slope, intercept } = pixels.rescale ?? { slope: 1, intercept: 0 };
  const { low, high } = pixels.padding ?? { low: Infinity, high: -Infinity };
  return { slope, intercept, low, high };
}

/** A neighbour of no weight is not asked: it may be padding, or lie outside. */
function mixed(a: number, b: number, part: number): number {
  return part === 0 ? a : a + (b - a) * part;
}

/** Neighbours and weights along one side; a place outside the other slice has NaN for its weight, and so no value. */
function placesOf(step: number, offset: number, count: number, limit: number) {
  const first = new Int32Array(count);
  const second = new Int32Array(count);
  const part = new Float64Array(count);
  for (let index = 0; index < count; index++) {
    const at = offset + step * index;
    const below = Math.floor(at);
    const isInside = at >= 0 && at <= limit - 1;
    first[index] = isInside ? below : 0;
    second[index] = isInside ? Math.min(below + 1, limit - 1) : 0;
    part[index] = isInside ? at - below : Number.NaN;
  }
  return { first, second, part };
}

/** HU of every pixel; NaN for padding. */
function huOf(slice: ComparedSlice): Float32Array {
  const { slope, intercept, low, high } = conversionOf(slice);
  const { stored } = slice;
  const hu = new Float32Array(stored.length);
  for (let index = 0; index < stored.length; index++) {
    const value = stored[index] as number;
    hu[index] = value >= low && value <= high ? Number.NaN : value * slope + intercept;
  }
  return hu;
}

function isWhole({ columnStep, columnOffset, rowStep, rowOffset }: LatticeMap): boolean {
  return [columnStep, columnOffset, rowStep, rowOffset].every(Number.isInteger);
}
