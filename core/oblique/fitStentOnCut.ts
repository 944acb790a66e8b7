import {
  add,
  distance,
  gridNormal,
  patientToPixel,
  pixelToPatient,
  type SliceGrid,
  scale,
  type Vec3,
} from '../geometry/index.js';
import type { KernelTexture, PairTexture } from '../quality/index.js';
import { type Result, refuse, success } from '../result.js';
import type { Stack, StackSlice } from '../stack/index.js';
import {
  type FittedStent,
  fitStentOn,
  type StentFit,
  type StentPlace,
  type StoredOfStack,
} from '../stent/index.js';
import { asSlice, type CutSlice } from './asSlice.js';
import { cutApodisation, type SampledStack } from './cutApodisation.js';
import { cutStack } from './cutStack.js';
import { angleToSlicesDeg } from './obliquePlane.js';

/** Planes beside the one that was laid, mm: those of a few neighbouring slices. */
const OFFSETS_MM = [-1, -0.5, 0, 0.5, 1] as const;
/** Half side of what is cut around the place, mm: a little more than a fit looks at. */
const HALF_SIDE_MM = 7.2;
/** What the thickness of the slices, or their spacing, smears in the plane may be this much, mm: struts blur into one beyond. */
const MOST_SMEAR_MM = 0.56;

/**
 * Fits a stent to both kernels on an oblique plane that runs across the vessel. Both stacks are cut by the plane and by
 * four parallel ones, by cubic convolution; kernels, thickness and interpolation enter as the plane sees them
 * ({@link cutApodisation}).
 *
 * @param plane pixel grid of the cut; what is left over is given on its pixels
 */
export function fitStentOnCut(
  place: StentPlace,
  plane: SliceGrid,
  soft: Stack,
  sharp: Stack,
  storedOf: StoredOfStack,
  texture: PairTexture,
): FittedStent {
  const { soft: softTexture, sharp: sharpTexture } = texture;
  if (softTexture === null || sharpTexture === null)
    return {
      reason: {
        code: 'no-texture',
        text: 'The noise of the kernels was not measured: their blur is not known, and no stent is fitted.',
      },
    };
  const part = partAround(plane, place.centreMm);
  const kernels: { readonly stack: Stack; readonly texture: KernelTexture }[] = [];
  const sampled: SampledStack[] = [];
  const pixels = new Map<Stack, readonly CutSlice[]>();
  for (const [stack, own] of [
    [soft, softTexture],
    [sharp, sharpTexture],
  ] as const) {
    const known = sampledOf(stack, plane);
    if (!known.ok) return { reason: known.refusal };
    const cut = cutSlices(stack, part.grid, storedOf);
    if (!cut.ok) return { reason: cut.refusal };
    sampled.push(known.value);
    kernels.push({ stack: cut.value.stack, texture: own });
    pixels.set(cut.value.stack, cut.value.cuts);
  }
  const fit = fitStentOn(
    place,
    kernels,
    (stack, index) => pixels.get(stack)?.[index]?.stored,
    cutApodisation(plane, sampled),
  );
  return fit.reason !== undefined ? fit : onPlane(fit, part);
}

interface Part {
  readonly grid: SliceGrid;
  /** First column and row of the part in the plane. */
  readonly column: number;
  readonly row: number;
}

/** The pixels of a plane around a place, beyond its border too: the plane has no end, its picture has. */
function partAround(plane: SliceGrid, placeMm: Vec3): Part {
  const centre = patientToPixel(plane, placeMm);
  const [down, across] = plane.pixelSpacingMm.map((spacing) =>
    Math.ceil(HALF_SIDE_MM / spacing),
  ) as [number, number];
  const [column, row] = [Math.round(centre.column) - across, Math.round(centre.row) - down];
  return {
    column,
    row,
    grid: {
      ...plane,
      positionMm: pixelToPatient(plane, { column, row }),
      columns: 2 * across + 1,
      rows: 2 * down + 1,
    },
  };
}

function sampledOf(stack: Stack, plane: SliceGrid): Result<SampledStack> {
  const { grid, acquisition } = stack.slices[0].image;
  const { thicknessMm } = acquisition;
  const { sliceSpacingMm } = stack;
  if (thicknessMm === undefined || sliceSpacingMm === undefined)
    return refuse(
      'no-thickness',
      'The thickness or the spacing of the slices is not known: on an oblique cut no stent can be fitted.',
    );
  const sine = Math.sin((angleToSlicesDeg(plane, grid) * Math.PI) / 180);
  const smearMm = Math.max(thicknessMm, sliceSpacingMm) * sine;
  if (smearMm > MOST_SMEAR_MM)
    return refuse(
      'too-thick',
      `The slices are too thick for this oblique cut: they smear ${smearMm.toFixed(1)} mm in its plane, and ${MOST_SMEAR_MM} mm is the most.`,
    );
  return success({ grid, thicknessMm, sliceSpacingMm });
}

/** Parallel cuts of a stack as a stack. */
function cutSlices(
  stack: Stack,
  grid: SliceGrid,
  storedOf: StoredOfStack,
): Result<{ readonly stack: Stack; readonly cuts: readonly CutSlice[] }> {
  const normal = gridNormal(grid);
  const cuts: CutSlice[] = [];
  for (const offset of OFFSETS_MM) {
    const moved = { ...grid, positionMm: add(grid.positionMm, scale(normal, offset)) };
    const cut = cutStack(stack, (index) => storedOf(stack, index), moved, {
      interpolation: 'cubic',
    });
    if (!cut.ok) return cut;
    if (cut.value.lacking.length > 0)
      return refuse('slice-missing', 'A slice next to the point could not be read.');
    cuts.push(asSlice(cut.value));
  }
  const [first, ...rest] = cuts.map((cut): StackSlice => cut.stack.slices[0]);
  if (first === undefined) throw new RangeError('no planes were cut');
  const spacingMm = distance(first.image.grid.positionMm, (rest[0] ?? first).image.grid.positionMm);
  return success({
    cuts,
    stack: { ...(cuts[0] as CutSlice).stack, slices: [first, ...rest], sliceSpacingMm: spacingMm },
  });
}

/** What is left over, on the pixels of the plane and not of the part. */
function onPlane(fit: StentFit, { column, row }: Part): StentFit {
  const kernels = fit.kernels.map((result) => ({
    ...result,
    residual: {
      ...result.residual,
      sliceIndex: 0,
      column: result.residual.column + column,
      row: result.residual.row + row,
    },
  }));
  return { ...fit, kernels };
}
