import { insideEllipse, type PhantomEllipse } from './ellipse.js';

/** One tissue of a slice. */
export interface SceneObject extends PhantomEllipse {
  readonly name: string;
  readonly hu: number;
}

/** A tissue that lies wholly inside one even tissue: only what it differs by has to be added. */
export interface Inset extends SceneObject {
  /** HU of the tissue around it. */
  readonly aroundHu: number;
}

/**
 * One slice, constant through its thickness, in air. `painted` may overlap: a later one covers what is under it.
 * `insets` lie on top of these, each wholly inside even tissue, and an inset in an inset comes after it.
 */
export interface SceneSlice {
  readonly painted: readonly SceneObject[];
  readonly insets: readonly Inset[];
}

export const AIR_HU = -1000;

/** The true HU at a place of a slice. */
export function huAt(slice: SceneSlice, xMm: number, yMm: number): number {
  const inset = slice.insets.findLast((one) => insideEllipse(one, xMm, yMm));
  if (inset !== undefined) return inset.hu;
  return slice.painted.findLast((one) => insideEllipse(one, xMm, yMm))?.hu ?? AIR_HU;
}

/** Attenuation relative to water's: (HU + 1000) / 1000, so that water is 1 and air is 0. */
export function relativeToWater(hu: number): number {
  return (hu - AIR_HU) / 1000;
}
