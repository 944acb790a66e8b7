import type { StoredValues } from '../../../../core/dicom/index.js';
import {
  alongNormal,
  gridNormal,
  pixelToPatient,
  type SliceGrid,
  type Vec3,
} from '../../../../core/geometry/index.js';
import type { StoredOf } from '../../../../core/region/index.js';
import type { Stack, StackSlice } from '../../../../core/stack/index.js';
import { readSpacing } from '../../../../core/stack/spacing.js';

/** How a volume is made from a field of HU. */
export interface MadeVolume {
  readonly heightsMm: readonly number[];
  readonly rows?: number;
  readonly columns?: number;
  readonly pixelSpacingMm?: readonly [number, number];
  readonly firstMm?: readonly [number, number];
  readonly rowDirection?: Vec3;
  readonly columnDirection?: Vec3;
  /** Shift of a slice along its columns for each mm of height: a sheared stack. */
  readonly shearPerMm?: number;
  /** Rescale of each slice; whole HU where nothing is said. */
  readonly slopeOf?: (slice: number) => number;
  readonly intercept?: number;
  readonly padding?: { readonly low: number; readonly high: number };
  readonly unsigned?: boolean;
}

/** A stack with the reader of its slices. */
export interface VolumeMade {
  readonly stack: Stack;
  readonly stored: readonly StoredValues[];
  readonly storedOf: StoredOf;
}

/** A stack whose pixels hold a field at their places in patient space, rounded to the stored values. */
export function madeVolume(
  field: (point: Vec3, slice: number) => number,
  {
    heightsMm,
    rows = 24,
    columns = 32,
    pixelSpacingMm = [0.5, 0.5],
    firstMm = [0, 0],
    rowDirection = [1, 0, 0],
    columnDirection = [0, 1, 0],
    shearPerMm = 0,
    slopeOf = () => 1,
    intercept = -1024,
    padding,
    unsigned = false,
  }: MadeVolume,
): VolumeMade {
  const plain: SliceGrid = {
    positionMm: [0, 0, 0],
    rowDirection,
    columnDirection,
    pixelSpacingMm,
    rows,
    columns,
  };
  const normal = gridNormal(plain);
  const placed = heightsMm.map((height, index) => {
    const [x, y] = [firstMm[0], firstMm[1] + shearPerMm * height];
    const at = (axis: 0 | 1 | 2): number =>
      x * rowDirection[axis] + y * columnDirection[axis] + height * normal[axis];
    const grid = { ...plain, positionMm: [at(0), at(1), at(2)] as const };
    const slope = slopeOf(index);
    const hu = Float64Array.from({ length: rows * columns }, (_, pixel) =>
      field(
        pixelToPatient(grid, { column: pixel % columns, row: Math.floor(pixel / columns) }),
        index,
      ),
    );
    const values = hu.map((value) => Math.round((value - intercept) / slope));
    const slice: StackSlice = {
      fileId: index,
      file: `made/${index}`,
      alongMm: alongNormal(plain, grid.positionMm),
      image: {
        sopClassUid: '1.2.840.10008.5.1.4.1.1.2',
        sopInstanceUid: `2.25.${100 + index}`,
        transferSyntaxUid: '1.2.840.10008.1.2.1',
        instanceNumber: index + 1,
        imageType: ['ORIGINAL', 'PRIMARY', 'AXIAL'],
        synthetic: true,
        identity: { studyInstanceUid: '2.25.1' },
        acquisition: { seriesInstanceUid: '2.25.2', thicknessMm: 0.75, lossy: false },
        grid,
        pixels: {
          bitsAllocated: 16,
          bitsStored: 16,
          highBit: 15,
          signed: !unsigned,
          photometric: 'MONOCHROME2',
          unit: 'HU',
          rescale: { slope, intercept },
          ...(padding !== undefined && { padding }),
        },
        windows: [],
        findings: [],
      },
    };
    return { slice, stored: unsigned ? Uint16Array.from(values) : Int16Array.from(values) };
  });
  const [first, ...rest] = placed.map(({ slice }) => slice);
  if (first === undefined) throw new RangeError('no slices in a stack');
  const stored = placed.map((one) => one.stored);
  const { sliceSpacingMm } = readSpacing(placed.map(({ slice }) => slice.alongMm));
  return {
    stack: {
      key: '2.25.2',
      slices: [first, ...rest],
      ...(sliceSpacingMm !== undefined && { sliceSpacingMm }),
      unit: 'HU',
      findings: [],
    },
    stored,
    storedOf: (index) => stored[index],
  };
}

/** Evenly spaced heights. */
export function evenHeights(count: number, stepMm: number, firstMm = 0): number[] {
  return Array.from({ length: count }, (_, index) => firstMm + index * stepMm);
}
