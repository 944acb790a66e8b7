import type { Plan, StackReference } from './plan.js';
import type { Note } from './schema.js';

/** The part of a note that can be measured. */
export function planOf(note: Note): Plan {
  const { soft, sharp } = note.pair;
  return {
    plan: 1,
    pair: { soft: reference(soft), ...(sharp === null ? {} : { sharp: reference(sharp) }) },
    regions: note.regions.map(({ id, role, shape }) => ({ id, role, shape })),
    contrasts: note.contrasts.map(({ id, lumen, wall, noise, reference: region }) => ({
      id,
      lumen,
      wall,
      noise,
      ...(region === undefined ? {} : { reference: region }),
    })),
    profiles: [],
    stents: [],
    ...(note.edges.length === 0
      ? {}
      : {
          edges: note.edges.map(({ id, fromMm, toMm, bandMm }) => ({ id, fromMm, toMm, bandMm })),
        }),
  };
}

function reference(stack: StackReference): StackReference {
  const { seriesInstanceUid, phasePercent, maskedBelowHu } = stack;
  return {
    seriesInstanceUid,
    ...(phasePercent === undefined ? {} : { phasePercent }),
    ...(maskedBelowHu === undefined ? {} : { maskedBelowHu }),
  };
}
