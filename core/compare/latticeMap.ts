import {
  dot,
  gridNormal,
  patientToPixel,
  pixelToPatient,
  type SliceGrid,
} from '../geometry/index.js';

/** Where the pixels of one slice lie on another one: column and row each go by a factor and an offset. */
export interface LatticeMap {
  readonly columnStep: number;
  readonly columnOffset: number;
  readonly rowStep: number;
  readonly rowOffset: number;
}

/** Cosine above which two directions count as one: 0.26°. Headers round their cosines. */
const PARALLEL = 1 - 1e-5;
/** Nearer than this to a whole pixel a place is that pixel: what headers round is no reason to interpolate. */
const WHOLE = 1e-3;

/** Whether rows and columns of two slices run in the same directions, so that one can be laid over the other. */
export function areAligned(a: SliceGrid, b: SliceGrid): boolean {
  return (
    dot(a.rowDirection, b.rowDirection) > PARALLEL &&
    dot(a.columnDirection, b.columnDirection) > PARALLEL &&
    dot(gridNormal(a), gridNormal(b)) > PARALLEL
  );
}

/**
 * The pixel of `to` over which a pixel of `from` lies, along the normal: column' = columnOffset + columnStep · column,
 * rows alike. Undefined for slices that are turned against each other. Within a thousandth of a pixel over the whole
 * slice, steps and offsets are whole.
 */
export function latticeMap(from: SliceGrid, to: SliceGrid): LatticeMap | undefined {
  if (!areAligned(from, to)) return undefined;
  const first = patientToPixel(to, pixelToPatient(from, { column: 0, row: 0 }));
  const columns = snapped(
    from.pixelSpacingMm[1] / to.pixelSpacingMm[1],
    first.column,
    from.columns,
  );
  const rows = snapped(from.pixelSpacingMm[0] / to.pixelSpacingMm[0], first.row, from.rows);
  return {
    columnStep: columns.step,
    columnOffset: columns.offset,
    rowStep: rows.step,
    rowOffset: rows.offset,
  };
}

function snapped(
  step: number,
  offset: number,
  count: number,
): { readonly step: number; readonly offset: number } {
  const [wholeStep, wholeOffset] = [Math.round(step), Math.round(offset)];
  const last = offset + step * (count - 1);
  const isWhole =
    Math.abs(offset - wholeOffset) < WHOLE &&
    Math.abs(last - (wholeOffset + wholeStep * (count - 1))) < WHOLE;
  return isWhole ? { step: wholeStep, offset: wholeOffset } : { step, offset };
}
