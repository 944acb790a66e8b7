import { distance } from '../geometry/index.js';
import { shapeCentre } from '../region/index.js';
import { type Result, refuse, success } from '../result.js';
import { nextNumber, rememberedNumbers } from './numbering.js';
import type { PlanStent } from './plan.js';
import type { Note, NoteRegion } from './schema.js';
import type { NoteStent, StentValue } from './stentSchema.js';
import { touched } from './touched.js';

/** Letter that begins the identifier of a fitted stent. */
export const STENT_LETTER = 'S';

/** Where a stent is fitted, and the nominal inner diameter and oblique plane, if any. */
export type StentPlacement = Omit<PlanStent, 'id'>;

/** Adds a fitted stent, or the place where none could be fitted, under the next free name: 'S2', 'Stent 2'. */
export function addStent(
  note: Note,
  place: StentPlacement,
  fit: StentValue | null,
  now: string,
  findingId: string | null = null,
): { readonly note: Note; readonly stent: NoteStent } {
  const { id, number, lastNumbers } = nextNumber(note, STENT_LETTER);
  const stent: NoteStent = { id, label: `Stent ${number}`, findingId, ...place, fit };
  return { note: touched(note, { stents: [...note.stents, stent], lastNumbers }, now), stent };
}

/** Gives a fitted stent another place or nominal diameter, with what is fitted there. */
export function changeStent(
  note: Note,
  id: string,
  place: StentPlacement,
  fit: StentValue | null,
  now: string,
): Result<{ readonly note: Note; readonly stent: NoteStent }> {
  const present = note.stents.find((stent) => stent.id === id);
  if (present === undefined) return refuse('unknown-stent', `The note has no fitted stent ${id}.`);
  const { label, findingId } = present;
  const stent: NoteStent = { id, label, findingId, ...place, fit };
  const stents = note.stents.map((other) => (other.id === id ? stent : other));
  return success({ note: touched(note, { stents }, now), stent });
}

/** Says which finding a fitted stent belongs to; null for none. */
export function assignStent(
  note: Note,
  id: string,
  findingId: string | null,
  now: string,
): Result<Note> {
  if (!note.stents.some((stent) => stent.id === id))
    return refuse('unknown-stent', `The note has no fitted stent ${id}.`);
  if (findingId !== null && !note.findings.some((finding) => finding.id === findingId))
    return refuse('unknown-finding', `The note has no finding ${findingId}.`);
  const stents = note.stents.map((other) => (other.id === id ? { ...other, findingId } : other));
  return success(touched(note, { stents }, now));
}

/** Removes a fitted stent; its number is not used again. */
export function removeStent(note: Note, id: string, now: string): Note {
  const stents = note.stents.filter((stent) => stent.id !== id);
  if (stents.length === note.stents.length) return note;
  return touched(note, { stents, lastNumbers: rememberedNumbers(note) }, now);
}

/**
 * The note with every stent fitted anew; one that can't be fitted now because images are still to come (null) keeps
 * what it had. The same note comes back where nothing has changed.
 */
export function withStentFits(
  note: Note,
  fitted: (stent: NoteStent) => StentValue | null,
  now: string,
): Note {
  const stents = note.stents.map((stent): NoteStent => {
    const next = { ...stent, fit: fitted(stent) ?? stent.fit };
    return JSON.stringify(next) === JSON.stringify(stent) ? stent : next;
  });
  const isSame = stents.every((stent, index) => stent === note.stents[index]);
  return isSame ? note : touched(note, { stents }, now);
}

/** A stent lies where a region does when its centre is within this of the region's, mm. */
const SAME_PLACE_MM = 2;

/** The stent of the note that was fitted where a region lies: of the same finding, or at the same place. */
export function stentAtRegion(
  { stents }: Pick<Note, 'stents'>,
  { shape, findingId, plane }: Pick<NoteRegion, 'shape' | 'findingId' | 'plane'>,
): NoteStent | undefined {
  const centreMm = shapeCentre(shape);
  const isHere = (stent: NoteStent): boolean =>
    stent.plane === plane &&
    distance(stent.fit?.axisMm ?? stent.centreMm, centreMm) <= SAME_PLACE_MM;
  return (
    stents.find(isHere) ??
    stents.find((stent) => stent.findingId !== null && stent.findingId === findingId)
  );
}
