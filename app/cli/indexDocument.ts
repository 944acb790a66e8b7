import type { FolderIndex, Stack } from '../../core/stack/index.js';

/** A stack as `index --json` prints it; null where its files are silent. */
export interface StackEntry {
  readonly key: string;
  readonly patientId: string | null;
  readonly studyInstanceUid: string;
  readonly seriesInstanceUid: string;
  readonly frameOfReferenceUid: string | null;
  readonly seriesNumber: number | null;
  readonly seriesDescription: string | null;
  readonly kernelLabel: string | null;
  readonly acquisitionNumber: number | null;
  readonly phasePercent: number | null;
  readonly kvp: number | null;
  readonly slices: number;
  readonly rows: number;
  readonly columns: number;
  /** [between rows, between columns]. */
  /** Null where the files have none. */
  readonly pixelSpacingMm: readonly [number, number] | null;
  readonly sliceSpacingMm: number | null;
  readonly thicknessMm: number | null;
  readonly transferSyntaxUid: string;
  readonly unit: string;
  readonly findings: readonly { readonly code: string; readonly text: string }[];
}

/** The document of `index`. */
export interface IndexDocument {
  readonly files: number;
  readonly stacks: readonly StackEntry[];
  readonly leftOut: FolderIndex['leftOut'];
}

/** What a folder holds, as one document. */
export function indexDocument({ files, stacks, leftOut }: FolderIndex): IndexDocument {
  return {
    files,
    stacks: stacks.map(stackEntry),
    leftOut: leftOut.map(({ file, code, text }) => ({ file, code, text })),
  };
}

function stackEntry(stack: Stack): StackEntry {
  const { identity, acquisition, grid, transferSyntaxUid } = stack.slices[0].image;
  return {
    key: stack.key,
    patientId: identity.patientId ?? null,
    studyInstanceUid: identity.studyInstanceUid,
    seriesInstanceUid: acquisition.seriesInstanceUid,
    frameOfReferenceUid: acquisition.frameOfReferenceUid ?? null,
    seriesNumber: acquisition.seriesNumber ?? null,
    seriesDescription: acquisition.seriesDescription ?? null,
    kernelLabel: acquisition.kernelLabel ?? null,
    acquisitionNumber: acquisition.acquisitionNumber ?? null,
    phasePercent: acquisition.phasePercent ?? null,
    kvp: acquisition.kvp ?? null,
    slices: stack.slices.length,
    rows: grid.rows,
    columns: grid.columns,
    pixelSpacingMm: grid.unscaled ? null : grid.pixelSpacingMm,
    sliceSpacingMm: stack.sliceSpacingMm ?? null,
    thicknessMm: acquisition.thicknessMm ?? null,
    transferSyntaxUid,
    unit: stack.unit,
    findings: stack.findings.map(({ code, text }) => ({ code, text })),
  };
}
