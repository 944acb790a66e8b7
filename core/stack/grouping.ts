import type { CtImage } from '../dicom/index.js';
import { dot, gridNormal } from '../geometry/index.js';

/** Direction cosines closer than this are one orientation; spacings closer than this, mm, one grid. */
const COSINE_TOLERANCE = 1e-4;
const SPACING_TOLERANCE_MM = 1e-4;

/**
 * What tells slices of one series apart for good: patient, study, acquisition, phase, trigger, kernel, and how
 * pixels are stored. Slices that differ in any of it never share a stack.
 */
export function groupKey({ identity, acquisition, grid, pixels }: CtImage): string {
  return JSON.stringify([
    identity.patientId ?? '',
    identity.patientName ?? '',
    identity.patientBirthDate ?? '',
    identity.studyInstanceUid,
    acquisition.seriesInstanceUid,
    acquisition.frameOfReferenceUid ?? '',
    acquisition.acquisitionNumber ?? null,
    acquisition.phasePercent ?? null,
    // A delay goes with the heart rate: it tells phases apart only where no percentage does.
    acquisition.phasePercent === undefined ? (acquisition.triggerTimeMs ?? null) : null,
    acquisition.kernelLabel ?? '',
    grid.rows,
    grid.columns,
    pixels.signed,
    pixels.unit,
    pixels.photometric,
  ]);
}

/** True when two slices have parallel axes and one pixel spacing, within rounding. */
export function sameGridKind(a: CtImage, b: CtImage): boolean {
  const parallel = (x: number): boolean => x > 1 - COSINE_TOLERANCE;
  return (
    a.grid.unscaled === b.grid.unscaled &&
    parallel(dot(a.grid.rowDirection, b.grid.rowDirection)) &&
    parallel(dot(a.grid.columnDirection, b.grid.columnDirection)) &&
    parallel(dot(gridNormal(a.grid), gridNormal(b.grid))) &&
    Math.abs(a.grid.pixelSpacingMm[0] - b.grid.pixelSpacingMm[0]) < SPACING_TOLERANCE_MM &&
    Math.abs(a.grid.pixelSpacingMm[1] - b.grid.pixelSpacingMm[1]) < SPACING_TOLERANCE_MM
  );
}
