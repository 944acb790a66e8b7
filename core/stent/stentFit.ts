import type { Vec3 } from '../geometry/index.js';
import type { KernelTexture } from '../quality/index.js';
import type { Refusal } from '../result.js';
import type { Stack } from '../stack/index.js';
import type { SectorResidual } from './sectors.js';

/** One reconstruction with its measured noise. */
export interface StentKernel {
  readonly stack: Stack;
  readonly texture: KernelTexture;
}

/** A value with its standard error. */
export interface Estimated {
  readonly value: number;
  /** From the fit: noise of the images, errors of W, and how they hang together. */
  readonly se: number;
}

/** What one kernel shows and what the fit leaves over. */
export interface KernelResult {
  /** Distance from the axis, mm: annular means of the image, and the model's. */
  readonly profile: {
    readonly radiusMm: readonly number[];
    readonly measuredHu: readonly number[];
    readonly modelHu: readonly number[];
  };
  /** The model over the distance from the axis in fine steps, for a picture of it. */
  readonly model: { readonly radiusMm: readonly number[]; readonly hu: readonly number[] };
  readonly residual: ResidualMap;
  /** Noise around the stent, HU. */
  readonly noiseSdHu: number;
}

/** What the fit leaves over on the slice next to the start: image minus model. */
export interface ResidualMap {
  readonly sliceIndex: number;
  readonly sopInstanceUid: string;
  /** Of the image's own pixels: first column and row, and how many. */
  readonly column: number;
  readonly row: number;
  readonly columns: number;
  readonly rows: number;
  /** HU, row after row. */
  readonly hu: Float32Array;
}

/** How well the fit explains the images. */
export interface Goodness {
  /** Sum of squares of the annular means in standard errors, and the number of means less that of parameters. */
  readonly chiSquare: number;
  readonly degreesOfFreedom: number;
  /** The sector around the stent in which most is left over, on the softer kernel. */
  readonly worstSector: SectorResidual | null;
  /** Line mass over its standard error. */
  readonly ringStandsOut: number;
}

/** A stent fitted to both kernels. */
export interface StentFit {
  readonly reason?: undefined;
  /** Diameter of the circle in the middle of the struts: the inner diameter plus one strut thickness. */
  readonly strutDiameterMm: Estimated;
  readonly lumenHu: Estimated;
  /** Where the axis meets the plane of the start. */
  readonly centreMm: Vec3;
  /** Direction of the axis, unit length, along the slices' normal, and its angle to that. */
  readonly axis: Vec3;
  readonly tiltDeg: number;
  readonly wallWidthMm: Estimated;
  readonly wallHu: Estimated;
  readonly fatHu: Estimated;
  /** HU above the wall times thickness, per length of the ring. */
  readonly strutMassHuMm: Estimated;
  readonly blurSigmaMm: Estimated;
  /** Standard errors again, from refits to the model with simulated noise; null where too few refits came to an end. */
  readonly refitted: {
    readonly strutDiameterMm: number;
    readonly lumenHu: number;
    readonly refits: number;
  } | null;
  /** In the order soft, sharp; one alone where one kernel was fitted. */
  readonly kernels: readonly KernelResult[];
  readonly goodness: Goodness;
  /** Heights that were used, relative to the start. */
  readonly slicesMm: readonly number[];
}

/** No value, and why. */
export interface NoStent {
  readonly reason: Refusal;
}

export type FittedStent = StentFit | NoStent;
