import { z } from 'zod';
import type { Frozen } from './frozen.js';

/** Which kernel's value is quoted; null where nothing is. */
export const QuoteSchema = z.enum(['soft', 'sharp', 'both', 'neither']).nullable();

/** Who says so: the rules, whose proposal follows the flags, or the reader, whose choice stays. */
export const QuoteBySchema = z.enum(['proposal', 'reader']);

/** A quote in force, with its reason. */
export const QuotedSchema = z.object({
  quote: QuoteSchema,
  quoteReason: z.string(),
  quoteBy: QuoteBySchema,
});

export type Quoted = Frozen<z.infer<typeof QuotedSchema>>;
