import { z } from 'zod';

const text = z.string();
const maybeText = z.string().nullable();
const maybeNumber = z.number().nullable();
const remark = z.object({ code: text, text });

/** What a region measured on one stack; null where it could not be had, with a flag that says why. */
export const RegionValueSchema = z.object({
  n: z.number().int().nonnegative(),
  meanHu: maybeNumber,
  sdHu: maybeNumber,
  minHu: maybeNumber,
  maxHu: maybeNumber,
  medianHu: maybeNumber,
  areaMm2: z.number(),
  sampledAreaMm2: z.number(),
  snr: maybeNumber,
  sliceIndex: z.number().int().nullable(),
  sliceOffsetMm: maybeNumber,
  sopInstanceUid: maybeText,
  /** Notes of earlier versions have none: their images were all single ones. */
  frameNumber: z.number().int().positive().nullable().default(null),
  standardErrorHu: maybeNumber,
  placementHu: maybeNumber,
  flags: z.array(remark),
});
