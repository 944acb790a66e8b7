import type { Stack } from '../stack/index.js';
import type { NoteStack } from './schema.js';

/** What a note keeps of a stack: reference, labels as the files have them, grid, and everything guessed on the way. */
export function noteStack(stack: Stack): NoteStack {
  const { acquisition, grid } = stack.slices[0].image;
  return {
    seriesInstanceUid: acquisition.seriesInstanceUid,
    ...(acquisition.phasePercent === undefined ? {} : { phasePercent: acquisition.phasePercent }),
    ...(stack.maskedBelowHu === undefined ? {} : { maskedBelowHu: stack.maskedBelowHu }),
    key: stack.key,
    seriesNumber: acquisition.seriesNumber ?? null,
    seriesDescription: acquisition.seriesDescription ?? null,
    kernelLabel: acquisition.kernelLabel ?? null,
    pixelSpacingMm: grid.unscaled ? null : [...grid.pixelSpacingMm],
    sliceSpacingMm: stack.sliceSpacingMm ?? null,
    thicknessMm: acquisition.thicknessMm ?? null,
    slices: stack.slices.length,
    unit: stack.unit,
    lossy: stack.slices.some(({ image }) => image.acquisition.lossy),
    findings: stack.findings.map(({ code, text }) => ({ code, text })),
  };
}
