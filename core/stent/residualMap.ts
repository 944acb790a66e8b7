import type { StoredValues } from '../dicom/index.js';
import { dot, patientToPixel, pixelToPatient, subtract } from '../geometry/index.js';
import { rescaled } from '../intensity/index.js';
import type { StackSlice } from '../stack/index.js';
import { atPlace, type ModelProfile } from './modelProfile.js';
import type { ResidualMap } from './stentFit.js';
import { axisAt, distanceFrom, type VesselAxis } from './vesselAxis.js';
import { type Frame, inPatient } from './windows.js';

/** Half side of the map, mm. */
const HALF_SIDE_MM = 4;

/** Image minus model on the pixels of one slice around the axis. */
export function residualMap(
  { image }: StackSlice,
  sliceIndex: number,
  stored: StoredValues,
  frame: Frame,
  axis: VesselAxis,
  profile: ModelProfile,
): ResidualMap {
  const { grid, pixels } = image;
  const zMm = dot(subtract(grid.positionMm, frame.originMm), frame.normal);
  const [u, v] = axisAt(axis, zMm);
  const middle = patientToPixel(grid, inPatient(frame, u, v, zMm));
  const reach = (spacing: number): number => HALF_SIDE_MM / spacing;
  const left = Math.max(0, Math.ceil(middle.column - reach(grid.pixelSpacingMm[1])));
  const right = Math.min(
    grid.columns - 1,
    Math.floor(middle.column + reach(grid.pixelSpacingMm[1])),
  );
  const top = Math.max(0, Math.ceil(middle.row - reach(grid.pixelSpacingMm[0])));
  const bottom = Math.min(grid.rows - 1, Math.floor(middle.row + reach(grid.pixelSpacingMm[0])));
  const [columns, rows] = [right - left + 1, bottom - top + 1];
  const distance = distanceFrom(axis);
  const hu = new Float32Array(columns * rows);
  for (let y = 0; y < rows; y += 1)
    for (let x = 0; x < columns; x += 1) {
      const [column, row] = [left + x, top + y];
      const away = subtract(pixelToPatient(grid, { column, row }), frame.originMm);
      const [du, dv] = [dot(away, frame.u) - u, dot(away, frame.v) - v];
      const rho = distance(du, dv);
      const value = rescaled(stored[row * grid.columns + column] as number, pixels);
      hu[y * columns + x] = value - atPlace(profile, rho, du, dv);
    }
  return {
    sliceIndex,
    sopInstanceUid: image.sopInstanceUid,
    column: left,
    row: top,
    columns,
    rows,
    hu,
  };
}
