import { type Result, refuse, success } from '../result.js';
import { nextNumber, rememberedNumbers } from './numbering.js';
import type { PlanPlane } from './plan.js';
import type { NotePlane } from './planeSchema.js';
import type { Note } from './schema.js';
import { touched } from './touched.js';

/** Letter that begins the identifier of an oblique plane. */
export const PLANE_LETTER = 'O';

/** How a plane lies and is cut. */
export type PlanePlacement = Omit<PlanPlane, 'id'>;

/** What is known of a plane once it was cut. */
export type CutFacts = Pick<NotePlane, 'angleDeg' | 'resampling' | 'source'>;

/** Adds an oblique plane under the next free name: 'O2', 'Cut 2'. */
export function addPlane(
  note: Note,
  placement: PlanePlacement,
  facts: CutFacts,
  now: string,
): { readonly note: Note; readonly plane: NotePlane } {
  const { id, number, lastNumbers } = nextNumber(note, PLANE_LETTER);
  const plane: NotePlane = { id, label: `Cut ${number}`, ...placement, ...facts };
  return { note: touched(note, { planes: [...note.planes, plane], lastNumbers }, now), plane };
}

/**
 * Gives a plane another course, interpolation or thickness. Refused where something is measured on it: marks lie on
 * the plane that they were drawn on.
 */
export function changePlane(
  note: Note,
  id: string,
  placement: PlanePlacement,
  facts: CutFacts,
  now: string,
): Result<{ readonly note: Note; readonly plane: NotePlane }> {
  const present = note.planes.find((plane) => plane.id === id);
  if (present === undefined) return refuse('unknown-plane', `The note has no cut ${id}.`);
  if (isPlaneUsed(note, id))
    return refuse(
      'plane-used',
      `Something is measured on ${present.label}: make another cut, or delete what lies on it first.`,
    );
  const plane: NotePlane = { id, label: present.label, ...placement, ...facts };
  const planes = note.planes.map((other) => (other.id === id ? plane : other));
  return success({ note: touched(note, { planes }, now), plane });
}

/** Removes a plane; refused where something is measured on it. */
export function removePlane(note: Note, id: string, now: string): Result<Note> {
  const present = note.planes.find((plane) => plane.id === id);
  if (present === undefined) return success(note);
  if (isPlaneUsed(note, id))
    return refuse(
      'plane-used',
      `Something is measured on ${present.label}: delete what lies on it first.`,
    );
  const planes = note.planes.filter((plane) => plane.id !== id);
  return success(touched(note, { planes, lastNumbers: rememberedNumbers(note) }, now));
}

/** Whether anything of the note is measured on a plane. */
export function isPlaneUsed(
  { regions, profiles, stents, edges }: Pick<Note, 'regions' | 'profiles' | 'stents' | 'edges'>,
  id: string,
): boolean {
  return [...regions, ...profiles, ...stents, ...edges].some(({ plane }) => plane === id);
}

/** The note with what is known of its planes after cutting; the same note where nothing has changed. */
export function withCutFacts(
  note: Note,
  factsOf: (plane: NotePlane) => CutFacts | null,
  now: string,
): Note {
  const planes = note.planes.map((plane): NotePlane => {
    const next = { ...plane, ...factsOf(plane) };
    return JSON.stringify(next) === JSON.stringify(plane) ? plane : next;
  });
  const isSame = planes.every((plane, index) => plane === note.planes[index]);
  return isSame ? note : touched(note, { planes }, now);
}
