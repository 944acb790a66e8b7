import { z } from 'zod';
import { DensitySchema } from './densitySchema.js';
import { NoteEdgeSchema } from './edgeSchema.js';
import type { Frozen } from './frozen.js';
import { AmendmentSchema, FrameDigestSchema, SealSchema } from './lifeSchema.js';
import {
  NoiseSourceSchema,
  PlanContrastSchema,
  PlanRegionSchema,
  StackReferenceSchema,
} from './plan.js';
import { NotePlaneSchema } from './planeSchema.js';
import { NoteProfileSchema } from './profileSchema.js';
import { QuoteBySchema, QuotedSchema } from './quoteSchema.js';
import { RegionValueSchema } from './regionValueSchema.js';
import { type RepeatedRegionSchema, RepeatSchema } from './repeatSchema.js';
import { NoteStentSchema } from './stentSchema.js';
import { PairTextureSchema } from './textureSchema.js';
import { VisibilitySchema } from './visibilitySchema.js';

const text = z.string();
const maybeText = z.string().nullable();
const maybeNumber = z.number().nullable();
const remark = z.object({ code: text, text });

/** The two kernels of a pair; the note and its exports call every value by one of these. */
export const KernelSchema = z.enum(['soft', 'sharp']);

/** One stack of the pair, with the labels as its files have them. */
export const NoteStackSchema = StackReferenceSchema.extend({
  key: text,
  seriesNumber: maybeNumber,
  seriesDescription: maybeText,
  kernelLabel: maybeText,
  /** Null where the files have none. */
  pixelSpacingMm: z.tuple([z.number(), z.number()]).nullable(),
  sliceSpacingMm: maybeNumber,
  thicknessMm: maybeNumber,
  slices: z.number().int().positive(),
  unit: text,
  lossy: z.boolean(),
  findings: z.array(remark),
});

export const EvidenceSchema = z.object({
  check: text,
  state: z.enum(['agrees', 'differs', 'unknown']),
  text,
});

/** How the two plates are linked: by position in patient space, or by slice index when positions can't be compared. */
export const LinkSchema = z.enum(['position', 'index']);

/** What the reader answers for although the files differ in it, and why. Patient and phase can't be answered for. */
export const PairOverrideSchema = z.object({
  check: z.enum(['frame of reference', 'study']),
  reason: z.string().regex(/\S/),
});

export const NotePairSchema = z.object({
  soft: NoteStackSchema,
  sharp: NoteStackSchema.nullable(),
  link: LinkSchema,
  evidence: z.array(EvidenceSchema),
  overrides: z.array(PairOverrideSchema).default([]),
  /** Noise and blur of both kernels, on which the standard errors rest; notes of earlier versions have none. */
  texture: PairTextureSchema.default({ soft: null, sharp: null }),
});

export const StudySchema = z.object({
  studyInstanceUid: text,
  patientId: maybeText,
  patientName: maybeText,
  patientBirthDate: maybeText,
  patientSex: maybeText,
  studyDate: maybeText,
  studyDescription: maybeText,
  accessionNumber: maybeText,
});

/** Conditions of the acquisition as the files state them; null where they are silent. */
export const ConditionsSchema = z.object({
  kvp: maybeNumber,
  phasePercent: maybeNumber,
  contrastAgent: maybeText,
  thicknessMm: maybeNumber,
  frameOfReferenceUid: maybeText,
});

export const FINDING_KINDS = [
  'stent',
  'non-calcified plaque',
  'mixed plaque',
  'calcified plaque',
  'native lumen',
  'reference',
] as const;

export const DOMINANCE = ['right', 'left', 'co-dominant'] as const;

/** Conditions that the reader may state where the files are silent. */
export const STATED_CONDITIONS = ['kvp', 'phasePercent', 'contrastAgent', 'thicknessMm'] as const;

export const ASSESSABILITY = ['assessable', 'limited', 'not assessable'] as const;

/** What is read at one place: a coronary segment of the 18-segment model, or none for a reference. */
export const NoteFindingSchema = z.object({
  id: text,
  segment: z.number().int().min(1).max(18).nullable(),
  kind: z.enum(FINDING_KINDS),
  nominalMm: maybeNumber,
  /** Nominal length of a stent. */
  lengthMm: maybeNumber.default(null),
  /** Whether the stent overlaps another one; null until the reader says so. */
  overlap: z.boolean().nullable().default(null),
  /** Where in the segment it lies, in the reader's words. */
  location: text.default(''),
  assessability: z.enum(ASSESSABILITY).nullable(),
  reason: text,
});

/** What the reader says of the whole coronary tree. */
export const AnatomySchema = z.object({
  dominance: z.enum(DOMINANCE).nullable(),
  /** Segments of the 18-segment model that this heart does not have. */
  absentSegments: z.array(z.number().int().min(1).max(18)),
});

export const NoteRegionSchema = PlanRegionSchema.extend({
  /** Name shown to the reader: 'Lumen 2'. */
  label: text,
  /** Where in the finding the region lies, in the reader's words: 'in stent'. */
  place: text,
  findingId: maybeText,
  /** Which kernel's value is quoted, why, and who says so. In earlier versions it was always the reader. */
  ...QuotedSchema.shape,
  quoteBy: QuoteBySchema.default('reader'),
  soft: RegionValueSchema.nullable(),
  sharp: RegionValueSchema.nullable(),
});

export const NoteContrastSchema = PlanContrastSchema.extend({
  formula: text,
  soft: maybeNumber,
  sharp: maybeNumber,
  flags: z.array(remark),
});

/** The reading note, version 1: one document for each study and reader. */
export const NoteSchema = z.object({
  format: z.literal('diptych-note'),
  version: z.literal(1),
  id: text,
  software: z.object({ name: text, version: text }),
  createdAt: text,
  changedAt: text,
  reader: text,
  completion: z.enum(['PARTIAL', 'COMPLETE']),
  verification: z.enum(['UNVERIFIED', 'VERIFIED']),
  synthetic: z.boolean(),
  study: StudySchema,
  pair: NotePairSchema,
  conditions: ConditionsSchema,
  /** Conditions that the reader stated; all others are the files' own. */
  conditionsByReader: z.array(z.enum(STATED_CONDITIONS)).default([]),
  /** Table of bands for the density of plaque. */
  bandTable: text.default('six-classes'),
  densities: z.array(DensitySchema).default([]),
  anatomy: AnatomySchema.default({ dominance: null, absentSegments: [] }),
  /** The noise of new contrasts. */
  noise: NoiseSourceSchema,
  findings: z.array(NoteFindingSchema),
  regions: z.array(NoteRegionSchema),
  contrasts: z.array(NoteContrastSchema),
  /** Lines across edges; notes of earlier versions have none. */
  edges: z.array(NoteEdgeSchema).default([]),
  /** Lines across stents and lumens, fitted stents, and oblique planes; notes of earlier versions have none. */
  profiles: z.array(NoteProfileSchema).default([]),
  stents: z.array(NoteStentSchema).default([]),
  planes: z.array(NotePlaneSchema).default([]),
  /** Readings of the same regions again; notes of earlier versions have none. */
  repeats: z.array(RepeatSchema).default([]),
  /** The smallest disc that could be seen; notes of earlier versions have none. */
  visibility: VisibilitySchema.nullable().default(null),
  /** Highest number ever given, by the letter of the identifier: a number is not used again after a removal. */
  lastNumbers: z.record(text, z.number().int().nonnegative()).exactOptional(),
  comment: text,
  /** The pixels that the values rest on; notes of earlier versions have none. */
  frames: z.array(FrameDigestSchema).default([]),
  seal: SealSchema.nullable().default(null),
  /** Earlier verified states, oldest first, each with the reason why it was opened again. */
  amendments: z.array(AmendmentSchema).default([]),
  /** What was taken out of an export without identity, in sentences; absent in the note itself. */
  deidentified: z.array(text).exactOptional(),
});

export type Note = Frozen<z.infer<typeof NoteSchema>>;
export type NoteRegion = Frozen<z.infer<typeof NoteRegionSchema>>;
export type NoteContrast = Frozen<z.infer<typeof NoteContrastSchema>>;
export type NoteFinding = Frozen<z.infer<typeof NoteFindingSchema>>;
export type NoteStack = Frozen<z.infer<typeof NoteStackSchema>>;
export type Study = Frozen<z.infer<typeof StudySchema>>;
export type Repeat = Frozen<z.infer<typeof RepeatSchema>>;
export type RepeatedRegion = Frozen<z.infer<typeof RepeatedRegionSchema>>;
export type Density = Frozen<z.infer<typeof DensitySchema>>;
export type Anatomy = Frozen<z.infer<typeof AnatomySchema>>;
export type Amendment = Frozen<z.infer<typeof AmendmentSchema>>;
export type FrameDigest = Frozen<z.infer<typeof FrameDigestSchema>>;
export type StatedCondition = (typeof STATED_CONDITIONS)[number];
export type Dominance = (typeof DOMINANCE)[number];
export type Conditions = Frozen<z.infer<typeof ConditionsSchema>>;
export type NotePair = Frozen<z.infer<typeof NotePairSchema>>;
export type PairOverride = Frozen<z.infer<typeof PairOverrideSchema>>;
export type Evidence = Frozen<z.infer<typeof EvidenceSchema>>;
export type Link = Frozen<z.infer<typeof LinkSchema>>;
export type Kernel = Frozen<z.infer<typeof KernelSchema>>;
export type Assessability = (typeof ASSESSABILITY)[number];
export type FindingKind = (typeof FINDING_KINDS)[number];
