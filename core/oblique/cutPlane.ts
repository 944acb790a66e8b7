/** What came of cutting. */
export interface CutPlane {
  /** Row after row, NaN where there is nothing. */
  readonly hu: Float32Array;
  /** 1 for each slice that a value of the plane rests on. */
  readonly used: Uint8Array;
  /** 1 for each slice that was wanted and could not be had. */
  readonly lacking: Uint8Array;
}

/** Room for a cut, with nothing in it. */
export function emptyCut(pixels: number, slices: number): CutPlane {
  return {
    hu: new Float32Array(pixels).fill(Number.NaN),
    used: new Uint8Array(slices),
    lacking: new Uint8Array(slices),
  };
}

/** Where a walk along one row of the plane stands. One is made for a cut and used for all its rows. */
export interface Walk {
  readonly columns: number;
  /** Index of the pixel, and what it grows by from one to the next. */
  at: number;
  step: number;
  /** Pixels walked, of {@link columns}. */
  walked: number;
  /** At the start of the row, and what each pixel adds: mm along the stack's normal; column and row beside a layer's own. */
  along: number;
  alongStep: number;
  column: number;
  columnStep: number;
  row: number;
  rowStep: number;
}
