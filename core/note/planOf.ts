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
  };
}

function reference({ seriesInstanceUid, phasePercent }: StackReference): StackReference {
  return { seriesInstanceUid, ...(phasePercent === undefined ? {} : { phasePercent }) };
}
