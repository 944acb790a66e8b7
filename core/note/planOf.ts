import type { Plan, PlanPlane, StackReference } from './plan.js';
import type { NotePlane } from './planeSchema.js';
import type { Note } from './schema.js';

/** The part of a note that can be measured. */
export function planOf(note: Note): Plan {
  const { soft, sharp } = note.pair;
  return {
    plan: 1,
    pair: { soft: reference(soft), ...(sharp === null ? {} : { sharp: reference(sharp) }) },
    regions: note.regions.map(({ id, role, shape, plane }) => ({
      id,
      role,
      shape,
      ...onPlane(plane),
    })),
    contrasts: note.contrasts.map(({ id, lumen, wall, noise, reference: region }) => ({
      id,
      lumen,
      wall,
      noise,
      ...(region === undefined ? {} : { reference: region }),
    })),
    profiles: note.profiles.map(({ id, fromMm, toMm, bandMm, nominalMm, plane }) => ({
      id,
      fromMm,
      toMm,
      bandMm,
      ...withNominal(nominalMm),
      ...onPlane(plane),
    })),
    stents: note.stents.map(({ id, centreMm, nominalMm, plane }) => ({
      id,
      centreMm,
      ...withNominal(nominalMm),
      ...onPlane(plane),
    })),
    ...(note.planes.length === 0 ? {} : { planes: note.planes.map(planPlane) }),
    ...(note.edges.length === 0
      ? {}
      : {
          edges: note.edges.map(({ id, fromMm, toMm, bandMm, plane }) => ({
            id,
            fromMm,
            toMm,
            bandMm,
            ...onPlane(plane),
          })),
        }),
  };
}

function planPlane({ id, courseMm, interpolation, slabMm }: NotePlane): PlanPlane {
  return {
    id,
    courseMm,
    ...(interpolation === undefined ? {} : { interpolation }),
    ...(slabMm === undefined ? {} : { slabMm }),
  };
}

function onPlane(plane: string | undefined): { readonly plane?: string } {
  return plane === undefined ? {} : { plane };
}

function withNominal(nominalMm: number | undefined): { readonly nominalMm?: number } {
  return nominalMm === undefined ? {} : { nominalMm };
}

function reference(stack: StackReference): StackReference {
  const { seriesInstanceUid, phasePercent, maskedBelowHu } = stack;
  return {
    seriesInstanceUid,
    ...(phasePercent === undefined ? {} : { phasePercent }),
    ...(maskedBelowHu === undefined ? {} : { maskedBelowHu }),
  };
}
