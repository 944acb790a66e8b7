import { z } from 'zod';
import { THICKEST_SLAB_MM } from '../oblique/cutStack.js';
import { ROLES } from '../region/roles.js';
import { PlanEdgeSchema } from './edgeSchema.js';
import type { Frozen } from './frozen.js';

const finite = z.number();
const positive = finite.positive();
const point = z.tuple([finite, finite, finite]);
const identifier = z.string().min(1).max(64);

export const ShapeSchema = z.discriminatedUnion('kind', [
  z.object({
    kind: z.literal('ellipse'),
    centreMm: point,
    u: point.exactOptional(),
    v: point.exactOptional(),
    radiiMm: z.tuple([positive, positive]),
  }),
  z.object({ kind: z.literal('outline'), pointsMm: z.array(point).min(3) }),
]);

export const StackReferenceSchema = z.object({
  seriesInstanceUid: z.string().min(1),
  phasePercent: finite.exactOptional(),
  /** Values below it are left out as no image, where the files do not mark them. */
  maskedBelowHu: finite.exactOptional(),
});

export const NoiseSourceSchema = z.enum(['lumen', 'wall', 'reference', 'pooled']);

export const PlanRegionSchema = z.object({
  id: identifier,
  role: z.enum(ROLES),
  shape: ShapeSchema,
  /** The oblique plane that it is measured on; on the slices where nothing is said. */
  plane: identifier.exactOptional(),
});

export const PlanContrastSchema = z.object({
  id: identifier,
  lumen: identifier,
  wall: identifier,
  noise: NoiseSourceSchema,
  reference: identifier.exactOptional(),
});

export const PlanProfileSchema = z.object({
  id: identifier,
  fromMm: point,
  toMm: point,
  bandMm: finite.nonnegative(),
  nominalMm: positive.exactOptional(),
  plane: identifier.exactOptional(),
});

export const PlanStentSchema = z.object({
  id: identifier,
  centreMm: point,
  nominalMm: positive.exactOptional(),
  plane: identifier.exactOptional(),
});

/** A plane across a vessel: at right angles to the course through two points, through their middle. */
export const PlanPlaneSchema = z.object({
  id: identifier,
  courseMm: z.tuple([point, point]),
  /** Cubic convolution where nothing is said. */
  interpolation: z.enum(['linear', 'cubic']).exactOptional(),
  /** Thickness that is averaged over, mm; a cut without thickness where nothing is said. */
  slabMm: positive.max(THICKEST_SLAB_MM).exactOptional(),
});

/** The part of a note that can be measured; what the command line's `measure` reads. */
export const PlanSchema = z.object({
  plan: z.literal(1),
  pair: z.object({ soft: StackReferenceSchema, sharp: StackReferenceSchema.exactOptional() }),
  regions: z.array(PlanRegionSchema).default([]),
  contrasts: z.array(PlanContrastSchema).default([]),
  profiles: z.array(PlanProfileSchema).default([]),
  stents: z.array(PlanStentSchema).default([]),
  /** Lines across edges. */
  edges: z.array(PlanEdgeSchema).exactOptional(),
  /** Oblique planes that the others are measured on. */
  planes: z.array(PlanPlaneSchema).exactOptional(),
});

export type Plan = Frozen<z.infer<typeof PlanSchema>>;
export type PlanRegion = Frozen<z.infer<typeof PlanRegionSchema>>;
export type PlanContrast = Frozen<z.infer<typeof PlanContrastSchema>>;
export type PlanProfile = Frozen<z.infer<typeof PlanProfileSchema>>;
export type PlanStent = Frozen<z.infer<typeof PlanStentSchema>>;
export type PlanPlane = Frozen<z.infer<typeof PlanPlaneSchema>>;
export type StackReference = Frozen<z.infer<typeof StackReferenceSchema>>;
export type NoiseSource = Frozen<z.infer<typeof NoiseSourceSchema>>;
