import type { PixelEncoding, StoredValues } from '../dicom/index.js';
import {
  distance,
  dot,
  gridNormal,
  patientToPixel,
  pixelToPatient,
  type SliceGrid,
  subtract,
} from '../geometry/index.js';
import { LOWEST_IMAGE_HU } from '../intensity/index.js';
import type { StoredOf } from '../region/index.js';
import type { Stack, StackSlice } from '../stack/index.js';

/** Wider than this part of the usual spacing a distance is a gap: a slice is missing (the rule of the stacks' findings). */
const GAP = 1.5;
/** Slices whose pixels lie above one another within this are taken to do so, pixels: 0.01 HU on an edge of 1000 HU a pixel. */
const SAME_PIXEL = 1e-5;

/** Slices beyond the first and the last one passed that take part: two to each side of a place. */
const BESIDE = 2;

/** One slice as a cut reads it. */
export interface Layer {
  readonly alongMm: number;
  /** Undefined where it can't be had. */
  readonly stored: StoredValues | undefined;
  readonly slope: number;
  readonly intercept: number;
  /** From this stored value on all is image; where that is not so simple, no stored value is so high. */
  readonly surelyFrom: number;
  /** Stored values that are no image: padding, inclusive, and what lies below the lowest HU. */
  readonly paddingLow: number;
  readonly paddingHigh: number;
  /** Place of the plane's first pixel in this slice's pixels, along the slice's normal. */
  readonly column: number;
  readonly row: number;
}

/** How places of the plane go over into places of a stack. Steps by column and by row of the plane. */
export interface PlaneInStack {
  readonly layers: readonly Layer[];
  readonly columns: number;
  readonly rows: number;
  readonly columnStep: readonly [number, number];
  readonly rowStep: readonly [number, number];
  /** Place of the plane's first pixel along the stack's normal, mm, and steps of it. */
  readonly alongMm: number;
  readonly alongStep: readonly [number, number];
  /** For each slice, whether the next one is its neighbour: no slice is missing between them. */
  readonly isNext: readonly boolean[];
}

/** The slices of a stack seen from a plane. Only those are asked for that the plane needs, each once. */
export function planeInStack(stack: Stack, storedOf: StoredOf, plane: SliceGrid): PlaneInStack {
  const { grid } = stack.slices[0].image;
  const normal = gridNormal(grid);
  const at = (column: number, row: number) => pixelToPatient(plane, { column, row });
  const corner = at(0, 0);
  const steps = [subtract(at(1, 0), corner), subtract(at(0, 1), corner)] as const;
  const [spacingDown, spacingAcross] = grid.pixelSpacingMm;
  const first = patientToPixel(grid, corner);
  const needed = slicesAcross(stack, plane);
  const layers = stack.slices.map((slice, index): Layer => {
    const own = patientToPixel(slice.image.grid, corner);
    const isAligned =
      Math.abs(own.column - first.column) < SAME_PIXEL &&
      Math.abs(own.row - first.row) < SAME_PIXEL;
    return {
      alongMm: slice.alongMm,
      stored: index >= needed.from && index < needed.end ? storedOf(index) : undefined,
      ...valuesOf(slice.image.pixels),
      ...(isAligned ? first : own),
    };
  });
  return {
    layers,
    columns: grid.columns,
    rows: grid.rows,
    columnStep: [
      dot(steps[0], grid.rowDirection) / spacingAcross,
      dot(steps[1], grid.rowDirection) / spacingAcross,
    ],
    rowStep: [
      dot(steps[0], grid.columnDirection) / spacingDown,
      dot(steps[1], grid.columnDirection) / spacingDown,
    ],
    alongMm: dot(corner, normal),
    alongStep: [dot(steps[0], normal), dot(steps[1], normal)],
    isNext: layers.map((layer, index) => {
      const next = layers[index + 1];
      return (
        next !== undefined && next.alongMm - layer.alongMm <= GAP * (stack.sliceSpacingMm ?? 0)
      );
    }),
  };
}

/** The slices that a plane passes, with those that cubic interpolation takes in beside them: from an index to before another. */
export function slicesAcross(
  { slices }: Stack,
  plane: SliceGrid,
): { readonly from: number; readonly end: number } {
  const normal = gridNormal(slices[0].image.grid);
  const heights = [0, plane.columns - 1].flatMap((column) =>
    [0, plane.rows - 1].map((row) => dot(pixelToPatient(plane, { column, row }), normal)),
  );
  const [lowest, highest] = [Math.min(...heights), Math.max(...heights)];
  const below = slices.filter(({ alongMm }) => alongMm < lowest).length;
  const reached = slices.filter(({ alongMm }) => alongMm <= highest).length;
  return {
    from: Math.max(0, below - BESIDE),
    end: Math.min(slices.length, reached + BESIDE),
  };
}

/** How far the corners of a slice lie, mm, from where they would if it had the directions and spacing of another. */
export function leanMm({ image: { grid } }: StackSlice, first: SliceGrid): number {
  const straight = { ...first, positionMm: grid.positionMm };
  const corners = [0, grid.columns - 1].flatMap((column) =>
    [0, grid.rows - 1].map((row) =>
      distance(pixelToPatient(grid, { column, row }), pixelToPatient(straight, { column, row })),
    ),
  );
  return Math.max(...corners);
}

/** Rescale of a slice, and which stored values are image. Below −1500 HU nothing is, marked or not: it must not be mixed in. */
function valuesOf({ rescale, padding }: PixelEncoding) {
  const { slope, intercept } = rescale ?? { slope: 1, intercept: 0 };
  const lowest = Math.ceil((LOWEST_IMAGE_HU - intercept) / slope);
  const above = padding === undefined ? -Infinity : padding.high + 1;
  // Padding that may lie above the image, or a slope that turns it over: each value is asked for itself.
  const isSimple = slope > 0 && (padding === undefined || padding.low * slope + intercept < 0);
  return {
    slope,
    intercept,
    surelyFrom: isSimple ? clamped(Math.max(lowest, above)) : NEVER,
    paddingLow: padding?.low ?? Infinity,
    paddingHigh: padding?.high ?? -Infinity,
  };
}

/** Beyond all stored values, of 16 bits, signed or not. */
const NEVER = 1 << 20;

function clamped(limit: number): number {
  return Math.min(NEVER, Math.max(-NEVER, limit));
}

/** HU of a stored value that is image; NaN of one that is not. */
export function imageHu(stored: number, layer: Layer): number {
  if (stored >= layer.paddingLow && stored <= layer.paddingHigh) return Number.NaN;
  const hu = stored * layer.slope + layer.intercept;
  return hu < LOWEST_IMAGE_HU ? Number.NaN : hu;
}
