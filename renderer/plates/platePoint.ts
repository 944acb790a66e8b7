/** A place on a plate: CSS pixels from its top left corner. */
export interface PlatePoint {
  readonly x: number;
  readonly y: number;
}
