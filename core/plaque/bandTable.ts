/** One band of CT numbers: above the band before it, up to and with `toHu`. */
export interface DensityBand {
  readonly name: string;
  /** Upper edge, included; null for no upper edge. */
  readonly toHu: number | null;
}

/** A published division of plaque into bands of CT numbers. */
export interface BandTable {
  readonly id: string;
  readonly name: string;
  /** Values at or above this belong to the first band; lower ones belong to none. Null for no lower edge. */
  readonly fromHu: number | null;
  readonly bands: readonly DensityBand[];
  /** Tube voltages that it was published for, kV; empty where the source does not say. */
  readonly kvp: readonly number[];
  readonly source: string;
}
