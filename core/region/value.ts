import type { Finding } from '../result.js';

/** Something about a number that the reader must know, or why there is none. */
export type Flag = Finding;

/** What a region measures on one stack. A value that can't be had is null, and a flag says why. */
export interface RegionValue {
  /** Pixels whose centres lie inside the shape, edge included, padding left out. */
  readonly n: number;
  readonly meanHu: number | null;
  /** Sample standard deviation, n − 1. */
  readonly sdHu: number | null;
  readonly minHu: number | null;
  readonly maxHu: number | null;
  readonly medianHu: number | null;
  /** Area of the shape itself. */
  readonly areaMm2: number;
  /** n times the area of a pixel. */
  readonly sampledAreaMm2: number;
  /** Mean / SD of this region. */
  readonly snr: number | null;
  /** Index from 0 into the stack's ordered slices; null when the region lies on none of them. */
  readonly sliceIndex: number | null;
  /** Distance from the region's plane to the slice, along the normal, signed, mm. */
  readonly sliceOffsetMm: number | null;
  readonly sopInstanceUid: string | null;
  /** Frame of a multi-frame image, counted from 1 as DICOM does; null for an image of its own. */
  readonly frameNumber: number | null;
  /** Standard error of the mean that noise alone makes, from its autocorrelation on this kernel. */
  readonly standardErrorHu: number | null;
  /** Largest change of the mean by half-pixel moves and 0.25 mm of size, see placementSensitivity. */
  readonly placementHu: number | null;
  readonly flags: readonly Flag[];
}
