import { z } from 'zod';
import type { Frozen } from './frozen.js';
import { PlanProfileSchema } from './plan.js';
import { QuoteBySchema, QuoteSchema } from './quoteSchema.js';

const maybeNumber = z.number().nullable();

/** What a profile measured on one kernel: the fields are those of ProfileValue in core/stent, without its samples. */
export const NoteProfileValueSchema = z.object({
  kind: z.enum(['stent', 'lumen']).nullable(),
  struts: z.array(z.object({ atMm: z.number(), peakHu: z.number() })),
  halfHeightMm: z.tuple([z.number(), z.number()]).nullable(),
  visibleWidthMm: maybeNumber,
  lumenHu: maybeNumber,
  peakDistanceMm: maybeNumber,
  strutWidthMm: maybeNumber,
  riseMm: maybeNumber,
  narrowing: maybeNumber,
  sliceIndex: z.number().int().nullable(),
  sliceOffsetMm: maybeNumber,
  sopInstanceUid: z.string().nullable(),
  frameNumber: z.number().int().positive().nullable(),
  flags: z.array(z.object({ code: z.string(), text: z.string() })),
});

/** A line across a stent or a lumen, with what it measured. */
export const NoteProfileSchema = PlanProfileSchema.extend({
  /** Name shown to the reader: 'Profile 1'. */
  label: z.string(),
  /** How its numbers are defined, in words. */
  definition: z.string(),
  quote: QuoteSchema,
  quoteReason: z.string(),
  quoteBy: QuoteBySchema,
  soft: NoteProfileValueSchema.nullable(),
  sharp: NoteProfileValueSchema.nullable(),
});

export type NoteProfile = Frozen<z.infer<typeof NoteProfileSchema>>;
export type NoteProfileValue = Frozen<z.infer<typeof NoteProfileValueSchema>>;
