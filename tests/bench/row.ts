/** One measured row of the budget table. */
export interface Row {
  readonly work: string;
  readonly measured: number;
  readonly unit: string;
  /** What the design allows, in the same unit; undefined where only the ratio is bounded. */
  readonly budget?: number;
  /** The same work by a general-purpose reference in the same run; absent where it is not installed. */
  readonly reference?: { readonly name: string; readonly measured: number };
  /** At least this many times faster than the reference. */
  readonly fasterThanReference?: number;
}

/** True when a row keeps its budget and its ratio. */
export function keeps({ measured, budget, reference, fasterThanReference }: Row): boolean {
  if (budget !== undefined && measured > budget) return false;
  if (reference === undefined || fasterThanReference === undefined) return true;
  return reference.measured / measured >= fasterThanReference;
}

/** A row as a line: work, figure, budget, ratio, verdict. */
export function rowInWords(row: Row): string {
  const { work, measured, unit, budget, reference, fasterThanReference } = row;
  const ratio =
    reference === undefined
      ? 'reference not installed'
      : `${(reference.measured / measured).toFixed(2)} × ${reference.name} (${reference.measured.toFixed(3)} ${unit})` +
        (fasterThanReference === undefined ? '' : `, wanted ${fasterThanReference} ×`);
  const limit = budget === undefined ? '' : `, budget ${budget} ${unit}`;
  return `${keeps(row) ? 'kept  ' : 'MISSED'}  ${work}: ${measured.toFixed(3)} ${unit}${limit}; ${ratio}`;
}
