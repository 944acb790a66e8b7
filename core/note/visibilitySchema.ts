import { z } from 'zod';

const maybeNumber = z.number().nullable();

/** What stands out k times its noise is seen: Rose's criterion, k of 3 to 5. */
export const ROSE_CRITERIA = [3, 4, 5] as const;

/**
 * The smallest disc that could be seen on each kernel: the reader's choice of k and of a contrast, and what came of
 * it. The contrast is that of a lumen and a wall of the note as each kernel shows it, or one that was typed.
 */
export const VisibilitySchema = z.object({
  /** Rose's criterion. */
  k: z.union([z.literal(3), z.literal(4), z.literal(5)]),
  /** The contrast of the note that it was taken from; null where it was typed. */
  contrastId: z.string().nullable(),
  /** Contrast that was asked about on each kernel, HU, without a sign; null where the kernel has none. */
  softHu: maybeNumber,
  sharpHu: maybeNumber,
  /** Diameter of the smallest disc that could be seen, mm; null where it can't be told. */
  softMm: maybeNumber,
  sharpMm: maybeNumber,
});

export type Visibility = Readonly<z.infer<typeof VisibilitySchema>>;
export type RoseCriterion = (typeof ROSE_CRITERIA)[number];
