import type { SliceGrid } from '../geometry/index.js';
import type { Finding } from '../result.js';

/** One window of an image: centre and width in the units of the Modality LUT's output (PS3.3 C.11.2.1.2). */
export interface VoiWindow {
  readonly centre: number;
  readonly width: number;
  readonly function: VoiFunction;
  readonly explanation?: string;
  /** In place of centre and width, which then only say what range it covers. */
  readonly table?: VoiTable;
}

/**
 * A VOI LUT (PS3.3 C.11.2.1.1) as grey levels 0 … 255: each step's level holds from its input (a Modality LUT output)
 * to the next step's. The first level also holds for all below it, the last for all above.
 */
export type VoiTable = readonly (readonly [input: number, level: number])[];

export type VoiFunction = 'LINEAR' | 'LINEAR_EXACT' | 'SIGMOID';

/** Table of a Modality LUT (PS3.3 C.11.1.1): the first value is for a stored value and all below it, the last for all above. */
export interface ModalityLut {
  readonly firstStored: number;
  readonly values: readonly number[];
}

/** How stored bytes become stored values, and stored values HU (PS3.3 C.7.6.3, C.11.1, C.7.5.1.1.2). */
export interface PixelEncoding {
  readonly bitsAllocated: number;
  readonly bitsStored: number;
  readonly highBit: number;
  readonly signed: boolean;
  readonly photometric: 'MONOCHROME1' | 'MONOCHROME2';
  /** Absent when the file has none: then there are no HU. */
  readonly rescale?: { readonly slope: number; readonly intercept: number };
  /** A table in place of a rescale: the image is shown through it, and there are no HU. */
  readonly modalityLut?: ModalityLut;
  /** Unit of the rescaled value: HU, or what Rescale Type (0028,1054) says, or 'stored' without a rescale. */
  readonly unit: string;
  /** Inclusive range of STORED values that are not image. */
  readonly padding?: { readonly low: number; readonly high: number };
}

/** What a file says of the patient and the study. Raw text: show it as text only. */
export interface Identity {
  readonly patientId?: string;
  readonly patientName?: string;
  readonly patientBirthDate?: string;
  readonly patientSex?: string;
  readonly studyInstanceUid: string;
  readonly studyDate?: string;
  readonly studyTime?: string;
  readonly studyDescription?: string;
  readonly accessionNumber?: string;
}

/** What a file says of its series and of how it was acquired. Labels are never interpreted. */
export interface Acquisition {
  readonly seriesInstanceUid: string;
  readonly seriesNumber?: number;
  readonly seriesDescription?: string;
  readonly seriesDate?: string;
  readonly seriesTime?: string;
  readonly frameOfReferenceUid?: string;
  /** Convolution Kernel (0018,1210), its values joined with a backslash as in the file. */
  readonly kernelLabel?: string;
  readonly acquisitionNumber?: number;
  /** Acquisition UID (0008,0017). */
  readonly acquisitionUid?: string;
  readonly acquisitionDate?: string;
  readonly acquisitionTime?: string;
  readonly phasePercent?: number;
  readonly triggerTimeMs?: number;
  /** Nominal Interval (0018,1062) or R-R Interval Time Nominal (0020,9251): the usual R-R interval of these images, ms. */
  readonly nominalIntervalMs?: number;
  /** Temporal Position Identifier (0020,0100) or Index (0020,9128). */
  readonly temporalPosition?: number;
  readonly kvp?: number;
  readonly thicknessMm?: number;
  readonly contrastAgent?: string;
  readonly manufacturer?: string;
  readonly model?: string;
  readonly softwareVersions?: string;
  readonly reconstructionDiameterMm?: number;
  readonly lossy: boolean;
}

/** One CT slice: everything its file says that the bench uses, without the pixels. */
export interface CtImage {
  readonly sopClassUid: string;
  /** Empty when the file has none; stacks then give it one of their own making, with a finding. So with study and series. */
  readonly sopInstanceUid: string;
  /** How the pixels are really encoded, where that differs from what the file says. */
  readonly transferSyntaxUid: string;
  /** Frame of a multi-frame image, from 0; absent for an image of its own. */
  readonly frame?: number;
  readonly instanceNumber?: number;
  readonly imageType: readonly string[];
  /** True when the file itself says that it is synthetic. */
  readonly synthetic: boolean;
  readonly identity: Identity;
  readonly acquisition: Acquisition;
  readonly grid: SliceGrid;
  readonly pixels: PixelEncoding;
  readonly windows: readonly VoiWindow[];
  readonly findings: readonly Finding[];
}
