import type { Anatomy, Conditions, Note, StatedCondition } from './schema.js';
import { touched } from './touched.js';

/** The reader's free comment on the whole reading. */
export function setComment(note: Note, comment: string, now: string): Note {
  return comment === note.comment ? note : touched(note, { comment }, now);
}

/** Dominance, and the segments that this heart does not have, in ascending order and each once. */
export function setAnatomy(note: Note, change: Partial<Anatomy>, now: string): Note {
  const anatomy = { ...note.anatomy, ...change };
  const absentSegments = [...new Set(anatomy.absentSegments)].sort((a, b) => a - b);
  return touched(note, { anatomy: { ...anatomy, absentSegments } }, now);
}

/** Whether the reader may state a condition: the files are silent about it, or the reader stated it before. */
export function mayState(note: Note, condition: StatedCondition): boolean {
  return note.conditions[condition] === null || note.conditionsByReader.includes(condition);
}

/**
 * States a condition that the files do not, or takes back what the reader stated (null). Its origin is kept. What
 * a file states is never overwritten: the note comes back as it is.
 */
export function stateCondition<Condition extends StatedCondition>(
  note: Note,
  condition: Condition,
  value: Conditions[Condition],
  now: string,
): Note {
  if (!mayState(note, condition) || note.conditions[condition] === value) return note;
  const others = note.conditionsByReader.filter((name) => name !== condition);
  return touched(
    note,
    {
      conditions: { ...note.conditions, [condition]: value },
      conditionsByReader: value === null ? others : [...others, condition],
    },
    now,
  );
}
