import { z } from 'zod';
import { ShapeSchema } from './plan.js';
import { RegionValueSchema } from './regionValueSchema.js';

/** A region drawn again, and what it measured then. */
export const RepeatedRegionSchema = z.object({
  regionId: z.string(),
  shape: ShapeSchema,
  soft: RegionValueSchema.nullable(),
  sharp: RegionValueSchema.nullable(),
});

/** A reading of the same regions again, blind to the first. It runs until it is finished. */
export const RepeatSchema = z.object({
  id: z.string(),
  startedAt: z.string(),
  finishedAt: z.string().nullable(),
  reader: z.string(),
  regions: z.array(RepeatedRegionSchema),
  /** Regions that the reader left out. */
  skipped: z.array(z.string()),
});
