import { z } from 'zod';
import type { Acquisition, CtImage, Identity, PixelEncoding } from '../../../core/dicom/index.js';
import type { SliceGrid } from '../../../core/geometry/index.js';
import type { FileState } from './readFileHeader.js';

/** Raise it when the text of a cache, or the meaning of anything in it, changes. */
export const CACHE_FORMAT = 2;

/** A schema for every key of a type: a key that is added to the type is missed here by the compiler. */
type Shape<T> = { readonly [K in keyof T]-?: z.ZodType<T[K]> };

const text = z.string();
const maybeText = text.exactOptional();
const maybeNumber = z.number().exactOptional();
const remark = z.looseObject({ code: text, text });
const vector = z.tuple([z.number(), z.number(), z.number()]);

const IdentitySchema = z.strictObject({
  patientId: maybeText,
  patientName: maybeText,
  patientBirthDate: maybeText,
  patientSex: maybeText,
  studyInstanceUid: text,
  studyDate: maybeText,
  studyTime: maybeText,
  studyDescription: maybeText,
  accessionNumber: maybeText,
} satisfies Shape<Identity>);

const AcquisitionSchema = z.strictObject({
  seriesInstanceUid: text,
  seriesNumber: maybeNumber,
  seriesDescription: maybeText,
  seriesDate: maybeText,
  seriesTime: maybeText,
  frameOfReferenceUid: maybeText,
  kernelLabel: maybeText,
  acquisitionNumber: maybeNumber,
  acquisitionUid: maybeText,
  acquisitionDate: maybeText,
  acquisitionTime: maybeText,
  phasePercent: maybeNumber,
  triggerTimeMs: maybeNumber,
  nominalIntervalMs: maybeNumber,
  temporalPosition: maybeNumber,
  kvp: maybeNumber,
  thicknessMm: maybeNumber,
  contrastAgent: maybeText,
  manufacturer: maybeText,
  model: maybeText,
  softwareVersions: maybeText,
  reconstructionDiameterMm: maybeNumber,
  lossy: z.boolean(),
} satisfies Shape<Acquisition>);

const PixelsSchema = z.strictObject({
  bitsAllocated: z.number(),
  bitsStored: z.number(),
  highBit: z.number(),
  signed: z.boolean(),
  photometric: z.enum(['MONOCHROME1', 'MONOCHROME2']),
  rescale: z.strictObject({ slope: z.number(), intercept: z.number() }).exactOptional(),
  modalityLut: z
    .strictObject({ firstStored: z.number(), values: z.array(z.number()) })
    .exactOptional(),
  unit: text,
  padding: z.strictObject({ low: z.number(), high: z.number() }).exactOptional(),
} satisfies Shape<PixelEncoding>);

const WindowSchema = z.strictObject({
  centre: z.number(),
  width: z.number(),
  function: z.enum(['LINEAR', 'LINEAR_EXACT', 'SIGMOID']),
  explanation: maybeText,
  table: z.array(z.tuple([z.number(), z.number()])).exactOptional(),
} satisfies Shape<CtImage['windows'][number]>);

type GridKind = Omit<SliceGrid, 'positionMm'>;

const GridKindSchema = z.strictObject({
  rowDirection: vector,
  columnDirection: vector,
  pixelSpacingMm: z.tuple([z.number(), z.number()]),
  rows: z.int().positive(),
  columns: z.int().positive(),
  unscaled: z.literal(true).exactOptional(),
} satisfies Shape<GridKind>);

/** What slices have in common stands in tables, each value once; a slice has its place in the table instead. */
export const PartsSchema = z.strictObject({
  imageType: z.array(z.array(text)),
  identity: z.array(IdentitySchema),
  acquisition: z.array(AcquisitionSchema),
  grid: z.array(GridKindSchema),
  pixels: z.array(PixelsSchema),
  windows: z.array(z.array(WindowSchema)),
  findings: z.array(z.array(remark)),
} satisfies Shape<{ [K in Part]: readonly (K extends 'grid' ? GridKind : CtImage[K])[] }>);

export type Part =
  | 'imageType'
  | 'identity'
  | 'acquisition'
  | 'grid'
  | 'pixels'
  | 'windows'
  | 'findings';
export type SlimImage = { [K in keyof CtImage]: K extends Part ? number : CtImage[K] } & {
  readonly positionMm: SliceGrid['positionMm'];
};

const place = z.int().nonnegative();
export const SlimImageSchema = z.strictObject({
  sopClassUid: text,
  sopInstanceUid: text,
  transferSyntaxUid: text,
  frame: z.int().nonnegative().exactOptional(),
  instanceNumber: maybeNumber,
  imageType: place,
  synthetic: z.boolean(),
  identity: place,
  acquisition: place,
  grid: place,
  positionMm: vector,
  pixels: place,
  windows: place,
  findings: place,
} satisfies Shape<SlimImage>);

const StateSchema = z.strictObject({
  size: z.number(),
  mtimeMs: z.number(),
  ctimeMs: z.number(),
  ino: z.number(),
} satisfies Shape<FileState>);

const FileSchema = z.strictObject({
  path: text,
  state: StateSchema,
  found: z.union([
    z.strictObject({
      images: z.tuple([SlimImageSchema], SlimImageSchema),
      leftOut: z.array(remark).exactOptional(),
    }),
    z.strictObject({ code: text, text }),
  ]),
});

export const CacheSchema = z.strictObject({
  format: z.literal(CACHE_FORMAT),
  reader: text,
  root: text,
  parts: PartsSchema,
  files: z.array(FileSchema),
});
