import { z } from 'zod';
import type { Frozen } from './frozen.js';
import { PlanPlaneSchema } from './plan.js';

/** An image that a cut begins or ends in. */
const SourceImageSchema = z.object({
  sopInstanceUid: z.string(),
  frameNumber: z.number().int().positive().nullable(),
  sliceIndex: z.number().int().nonnegative(),
});

/** The images of one stack that a cut rests on: the lowest and the highest. */
const CutSourceSchema = z.object({ first: SourceImageSchema, last: SourceImageSchema }).nullable();

/** An oblique plane of the note. What is measured on it is resampled. */
export const NotePlaneSchema = PlanPlaneSchema.extend({
  /** Name shown to the reader: 'Cut 1'. */
  label: z.string(),
  /** Angle between the plane and the slices of the soft stack, degrees; null until it was cut. */
  angleDeg: z.number().nullable(),
  /** How the values between the pixels are made, in words. */
  resampling: z.string(),
  source: z.object({ soft: CutSourceSchema, sharp: CutSourceSchema }),
});

export type NotePlane = Frozen<z.infer<typeof NotePlaneSchema>>;
