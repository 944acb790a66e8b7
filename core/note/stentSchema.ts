import { z } from 'zod';
import type { Frozen } from './frozen.js';
import { PlanStentSchema } from './plan.js';

const maybeNumber = z.number().nullable();
const point = z.tuple([z.number(), z.number(), z.number()]);
const remark = z.object({ code: z.string(), text: z.string() });
const estimated = z.object({ value: z.number(), se: z.number() });

/** An image that a fit rests on: the slice next to the place, on one kernel. */
const StentImageSchema = z.object({
  kernel: z.enum(['soft', 'sharp']),
  sliceIndex: z.number().int(),
  sopInstanceUid: z.string(),
  frameNumber: z.number().int().positive().nullable(),
  /** Noise around the stent, HU. */
  noiseSdHu: z.number(),
});

/** What a fit on both kernels gave; all null with a reason where it gives no value. Standard errors are of the fit. */
export const StentValueSchema = z.object({
  /** Diameter of the circle in the middle of the struts: the inner diameter plus one strut thickness. */
  strutDiameterMm: estimated.nullable(),
  lumenHu: estimated.nullable(),
  wallWidthMm: estimated.nullable(),
  wallHu: estimated.nullable(),
  strutMassHuMm: estimated.nullable(),
  blurSigmaMm: estimated.nullable(),
  /** Standard errors again, by refits to simulated noise. */
  refitted: z
    .object({ strutDiameterMm: z.number(), lumenHu: z.number(), refits: z.number().int() })
    .nullable(),
  /** Where the axis meets the plane of the start, and its direction. */
  axisMm: point.nullable(),
  axis: point.nullable(),
  /** Angle between the axis and the normal of the plane that was fitted on, degrees. */
  tiltDeg: maybeNumber,
  /** Sum of squares of what is left over, in standard errors, and the degrees of freedom. */
  goodness: z.object({ chiSquare: z.number(), degreesOfFreedom: z.number().int() }).nullable(),
  /** What a plain round region in the lumen reads: struts bloom into it. */
  plain: z.object({ radiusMm: z.number(), softHu: maybeNumber, sharpHu: maybeNumber }).nullable(),
  /** Number of slices of each kernel that were fitted. */
  slices: z.number().int().nonnegative(),
  images: z.array(StentImageSchema),
  /** Why there is no value; null where there is one. */
  reason: remark.nullable(),
});

export const NoteStentSchema = PlanStentSchema.extend({
  /** Name shown to the reader: 'Stent 1'. */
  label: z.string(),
  /** The finding that it belongs to, if any. */
  findingId: z.string().nullable(),
  /** Null until it was fitted. */
  fit: StentValueSchema.nullable(),
});

export type StentValue = Frozen<z.infer<typeof StentValueSchema>>;
export type NoteStent = Frozen<z.infer<typeof NoteStentSchema>>;
