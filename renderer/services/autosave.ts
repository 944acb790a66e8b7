import type { Note } from '../../core/note/index.js';
import type { HostClient } from '../host/client.js';
import type { SaveState } from '../state/appState.js';

export interface AutosaveOptions {
  readonly client: Pick<HostClient, 'writeNote'>;
  readonly onState: (state: SaveState) => void;
  /** Time of day for the reader, such as '10:42'. */
  readonly timeOfDay: () => string;
  readonly signal: AbortSignal;
}

export interface Autosave {
  /** A note was opened or begun: from here on changes are guarded by its tag. */
  begin(note: Note, etag: string | undefined): void;
  /** A note was begun beside a kept one that can't be read: nothing is written, for the given reason. */
  beginUnsaved(note: Note, reason: string): void;
  /** Keeps a note at once, or right after the write that is running; what came between is left out. */
  save(note: Note): void;
  /** Keeps a note by hand: also one that holds nothing yet, and again after a failure. */
  saveNow(note: Note): void;
  /** Resolves when nothing is waiting to be kept. */
  settled(): Promise<void>;
}

const CONFLICT =
  'Another window has changed this note, so it is not saved here any more. Export it as JSON if you need it, then open the folder again to take the other version.';

/**
 * Keeps the note at every change, one write at a time with the latest note waiting behind it. The tag of the
 * last write guards the next one; once another window has written, nothing more is written from here. After
 * another failure the note waits and is tried again at the next change or by hand.
 */
export function createAutosave({ client, onState, timeOfDay, signal }: AutosaveOptions): Autosave {
  let etag: string | undefined;
  let kept: Note | undefined;
  let waiting: Note | undefined;
  let running: Promise<void> | undefined;
  /** Nothing may be written any more: another window has, or the kept note can't be read. */
  let blocked = false;
  /** Counts the notes that were begun, so that a write of the note before can't speak for this one. */
  let generation = 0;

  const writeAll = async (): Promise<void> => {
    while (waiting !== undefined && !blocked) {
      const note: Note = waiting;
      const mine = generation;
      waiting = undefined;
      onState({ kind: 'saving' });
      const written = await client.writeNote(note.study.studyInstanceUid, note, etag, signal);
      if (mine !== generation) continue;
      if (written.ok) {
        etag = written.value;
        kept = note;
        if (waiting === undefined) onState({ kind: 'saved', at: timeOfDay() });
        continue;
      }
      if (written.refusal.code === 'conflict') {
        blocked = true;
        waiting = undefined;
        onState({ kind: 'conflict', text: CONFLICT });
        return;
      }
      waiting ??= note;
      onState({ kind: 'failed', text: `The note is not saved. ${written.refusal.text}` });
      return;
    }
  };

  const start = (note: Note, tag: string | undefined, isBlocked: boolean): void => {
    generation += 1;
    etag = tag;
    kept = note;
    waiting = undefined;
    blocked = isBlocked;
  };

  const keep = (note: Note): void => {
    if (blocked) return;
    waiting = note;
    running ??= writeAll().finally(() => {
      running = undefined;
    });
  };

  return {
    beginUnsaved: (note, reason) => {
      start(note, undefined, true);
      onState({ kind: 'conflict', text: reason });
    },
    begin: (note, tag) => {
      start(note, tag, false);
      onState(tag === undefined ? { kind: 'none' } : { kind: 'saved', at: timeOfDay() });
    },
    // While a write is running the kept note is the one before it: a change back to that is a change too.
    save: (note) => {
      if (note !== kept || running !== undefined) keep(note);
    },
    saveNow: (note) => {
      if (note !== kept || running !== undefined || etag === undefined) keep(note);
    },
    settled: async () => {
      while (running !== undefined) await running;
    },
  };
}
