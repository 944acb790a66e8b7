import { z } from 'zod';

const maybeNumber = z.number().nullable();

/** Noise and blur of one kernel as they were measured; what a KernelTexture holds. */
export const KernelTextureSchema = z.object({
  noiseSdHu: z.number(),
  areas: z.number().int().positive(),
  frequencyPerMm: z.array(z.number()),
  powerHu2Mm2: z.array(z.number()),
  meanPerMm: z.number(),
  peakPerMm: z.number(),
  riseMm: maybeNumber,
  blurFwhmMm: maybeNumber,
  places: z
    .array(
      z.object({
        centreMm: z.tuple([z.number(), z.number(), z.number()]),
        sdHu: z.number(),
        meanHu: z.number().optional(),
      }),
    )
    .optional(),
});

/** Textures of both kernels; null where they were not measured. */
export const PairTextureSchema = z.object({
  soft: KernelTextureSchema.nullable(),
  sharp: KernelTextureSchema.nullable(),
});
