import type { Shape } from '../region/index.js';
import { type Result, refuse, success } from '../result.js';
import { nextNumber } from './numbering.js';
import type { RegionValues } from './regions.js';
import type { Note, NoteRegion, Repeat } from './schema.js';
import { touched } from './touched.js';

export const REPEAT_LETTER = 'T';

/** A repeat that is running: which region comes next, and how far it has come. */
export interface RunningRepeat {
  readonly repeat: Repeat;
  /** To be drawn now; undefined when all have been. */
  readonly next: NoteRegion | undefined;
  /** From 1. */
  readonly step: number;
  readonly steps: number;
}

/** The repeat that is running in a note; there is at most one. */
export function runningRepeat(note: Pick<Note, 'repeats' | 'regions'>): RunningRepeat | undefined {
  const repeat = note.repeats.find(({ finishedAt }) => finishedAt === null);
  if (repeat === undefined) return undefined;
  const done = new Set([...repeat.regions.map(({ regionId }) => regionId), ...repeat.skipped]);
  const regions = repeatable(note);
  const next = regions.find(({ id }) => !done.has(id));
  const steps = regions.length;
  return { repeat, next, step: Math.min(done.size + 1, steps), steps };
}

/** A region on an oblique plane is not read again: where the plane lies is a part of its reading. */
function repeatable({ regions }: Pick<Note, 'regions'>): readonly NoteRegion[] {
  return regions.filter(({ plane }) => plane === undefined);
}

/** Begins to read the note's regions again. Refused where there are none, and while another repeat runs. */
export function beginRepeat(
  note: Note,
  { reader, now }: { readonly reader: string; readonly now: string },
): Result<Note> {
  if (repeatable(note).length === 0) {
    return refuse('no-regions', 'There is no region on the slices yet that could be read again.');
  }
  if (runningRepeat(note) !== undefined) {
    return refuse(
      'repeat-running',
      'A repeat reading is running already. Finish it or give it up.',
    );
  }
  const { id, lastNumbers } = nextNumber(note, REPEAT_LETTER);
  const repeat: Repeat = {
    id,
    startedAt: now,
    finishedAt: null,
    reader,
    regions: [],
    skipped: [],
  };
  return success(touched(note, { repeats: [...note.repeats, repeat], lastNumbers }, now));
}

/** Puts the region that comes next in as it was drawn again. The note comes back as it is when none comes next. */
export function putRepeated(note: Note, shape: Shape, values: RegionValues, now: string): Note {
  const running = runningRepeat(note);
  if (running?.next === undefined) return note;
  const { repeat, next } = running;
  const regions = [...repeat.regions, { regionId: next.id, shape, ...values }];
  return withRepeat(note, { ...repeat, regions }, now);
}

/** Leaves the region that comes next out. */
export function skipRepeated(note: Note, now: string): Note {
  const running = runningRepeat(note);
  if (running?.next === undefined) return note;
  const { repeat, next } = running;
  return withRepeat(note, { ...repeat, skipped: [...repeat.skipped, next.id] }, now);
}

/** Ends the repeat: what was drawn stays. One without any region goes. */
export function finishRepeat(note: Note, now: string): Note {
  const running = runningRepeat(note);
  if (running === undefined) return note;
  if (running.repeat.regions.length === 0) return giveUpRepeat(note, now);
  return withRepeat(note, { ...running.repeat, finishedAt: now }, now);
}

/** Takes the running repeat back, with all that was drawn for it. */
export function giveUpRepeat(note: Note, now: string): Note {
  const running = runningRepeat(note);
  if (running === undefined) return note;
  const repeats = note.repeats.filter(({ id }) => id !== running.repeat.id);
  return touched(note, { repeats }, now);
}

function withRepeat(note: Note, changed: Repeat, now: string): Note {
  const repeats = note.repeats.map((repeat) => (repeat.id === changed.id ? changed : repeat));
  return touched(note, { repeats }, now);
}
