import { z } from 'zod';

const remark = z.object({ code: z.string(), text: z.string() });

/** How a plaque region's pixels on the soft kernel divide into the bands of a table. */
export const DensitySchema = z.object({
  regionId: z.string(),
  /** Identifier of the table of bands. */
  table: z.string(),
  n: z.number().int().nonnegative(),
  /** Pixels in each band of the table, in its order. */
  pixels: z.array(z.number().int().nonnegative()),
  /** Pixels below the table's lower edge. */
  unassigned: z.number().int().nonnegative(),
  pixelAreaMm2: z.number(),
  flags: z.array(remark),
});
