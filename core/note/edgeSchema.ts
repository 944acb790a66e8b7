import { z } from 'zod';
import { BAND_MM } from '../region/edgeSamples.js';
import type { Frozen } from './frozen.js';
import { QuoteBySchema, QuoteSchema } from './quoteSchema.js';

const maybeNumber = z.number().nullable();
const point = z.tuple([z.number(), z.number(), z.number()]);

/** A line across an edge in patient space, LPS, mm, with the width of the band that is measured. */
export const PlanEdgeSchema = z.object({
  id: z.string().min(1).max(64),
  fromMm: point,
  toMm: point,
  bandMm: z.number().min(BAND_MM.least).max(BAND_MM.most),
  /** The oblique plane that it is measured on; on the slices where nothing is said. */
  plane: z.string().min(1).max(64).exactOptional(),
});

/** What an edge line measured on one kernel; the fields are those of EdgeValue in core/region. */
export const EdgeValueSchema = z.object({
  riseMm: maybeNumber,
  riseErrorMm: maybeNumber,
  crossingsMm: maybeNumber,
  blurFwhmMm: maybeNumber,
  blurErrorMm: maybeNumber,
  fromHu: maybeNumber,
  toHu: maybeNumber,
  atMm: maybeNumber,
  n: z.number().int().nonnegative(),
  sliceIndex: z.number().int().nullable(),
  sliceOffsetMm: maybeNumber,
  sopInstanceUid: z.string().nullable(),
  frameNumber: z.number().int().positive().nullable(),
  flags: z.array(z.object({ code: z.string(), text: z.string() })),
});

export const NoteEdgeSchema = PlanEdgeSchema.extend({
  /** Name shown to the reader: 'Edge 1'. */
  label: z.string(),
  /** Which kernel's width is quoted; earlier versions said nothing, so that the proposal holds. */
  quote: QuoteSchema.default(null),
  quoteReason: z.string().default(''),
  quoteBy: QuoteBySchema.default('proposal'),
  soft: EdgeValueSchema.nullable(),
  sharp: EdgeValueSchema.nullable(),
});

export type PlanEdge = Frozen<z.infer<typeof PlanEdgeSchema>>;
export type NoteEdge = Frozen<z.infer<typeof NoteEdgeSchema>>;
