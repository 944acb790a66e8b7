import { readdir, readFile } from 'node:fs/promises';
import { join } from 'node:path';
import type { Note } from '../../../core/note/index.js';
import { type Result, refuse, success } from '../../../core/result.js';
import type { ListedNote } from '../contract.js';
import { fileErrorCode, fileErrorReason } from '../storage/fileError.js';
import { removeLeftovers } from '../storage/leftovers.js';
import { ensureOwnerFolder, writeOwnerFile } from '../storage/ownerFile.js';
import { createQueue } from '../storage/queue.js';
import { checkSentNote, checkStoredNote } from './checkNote.js';
import { keepVersion } from './keptVersions.js';
import { entityTag, type NoteKey, noteFolderName } from './noteFolder.js';

/** A note as it lies on the disk. */
export interface StoredNote {
  readonly note: Note;
  readonly bytes: Uint8Array<ArrayBuffer>;
  readonly etag: string;
}

/** What must hold for a note to be stored: there is none yet, or it is the one with one of these tags. */
export type SaveCondition =
  | { readonly kind: 'absent' }
  | { readonly kind: 'unchanged'; readonly etags: readonly string[] };

/** A note that was stored. */
export interface SavedNote {
  readonly etag: string;
  readonly created: boolean;
}

/** Reading notes: one JSON document for each study and reader. */
export interface NotesStore {
  /** Refused with 'no-note', 'note-broken', 'note-newer' or 'note-unreadable'. */
  read(key: NoteKey): Promise<Result<StoredNote>>;
  /**
   * Stores a note of its own study and reader; what it replaces is kept. Refused, with nothing changed:
   * 'note-invalid', 'note-conflict' (somebody else stored one meanwhile), 'note-broken' and 'note-newer'
   * (what is stored is never overwritten unread), 'note-not-written' (the disk).
   */
  save(value: unknown, condition: SaveCondition): Promise<Result<SavedNote>>;
  /** The stored notes of a study, by reader. What can't be read is left out: its own reader is told. */
  list(studyInstanceUid: string): Promise<readonly ListedNote[]>;
  settled(): Promise<void>;
}

/**
 * Notes in the given folder, for the owner alone. Within this process saves are one after another. Two
 * processes can pass the check of the tag in the same instant; then the earlier bytes are still kept.
 */
export function createNotes(folder: string): NotesStore {
  const queue = createQueue();
  /** Folders that this process has freed of what killed writers left. */
  const swept = new Set<string>();
  const folderOf = (key: NoteKey): string => join(folder, noteFolderName(key));

  const save = async (value: unknown, condition: SaveCondition): Promise<Result<SavedNote>> => {
    const sent = checkSentNote(value);
    if (!sent.ok) return sent;
    const { reader, study } = sent.value;
    const place = folderOf({ reader, studyInstanceUid: study.studyInstanceUid });
    const stored = await readStored(place);
    if (!stored.ok && stored.refusal.code !== 'no-note') return stored;
    const current = stored.ok ? stored.value : undefined;
    if (!holds(condition, current?.etag)) return conflict(current !== undefined);
    // What was sent is stored, not what the schema made of it: a field that this version does not know stays.
    const bytes = new TextEncoder().encode(`${JSON.stringify(value, null, 2)}\n`);
    const etag = entityTag(bytes);
    if (etag === current?.etag) return success({ etag, created: false });
    await ensureOwnerFolder(folder);
    await ensureOwnerFolder(place);
    if (!swept.has(place)) await removeLeftovers(place, Date.now());
    swept.add(place);
    if (current !== undefined) await keepVersion(join(place, 'earlier'), current.bytes);
    await writeOwnerFile(join(place, 'note.json'), bytes);
    return success({ etag, created: current === undefined });
  };

  return {
    read: (key) => queue.run(() => readStored(folderOf(key))),
    save: (value, condition) =>
      queue.run(async () => {
        try {
          return await save(value, condition);
        } catch (error) {
          const reason = fileErrorReason(error);
          if (reason === undefined) throw error;
          return refuse(
            'note-not-written',
            `The note could not be stored: ${reason}. Keep this window open and save again.`,
          );
        }
      }),
    list: (study) => queue.run(() => listed(folder, study)),
    settled: queue.settled,
  };
}

async function readStored(place: string): Promise<Result<StoredNote>> {
  try {
    const bytes = new Uint8Array(await readFile(join(place, 'note.json')));
    const note = checkStoredNote(bytes);
    return note.ok ? success({ note: note.value, bytes, etag: entityTag(bytes) }) : note;
  } catch (error) {
    const reason = fileErrorReason(error);
    if (reason === undefined) throw error;
    return fileErrorCode(error) === 'ENOENT'
      ? refuse('no-note', 'There is no note of this study yet.')
      : refuse('note-unreadable', `The stored note can’t be read: ${reason}.`);
  }
}

async function listed(folder: string, studyInstanceUid: string): Promise<readonly ListedNote[]> {
  const found: ListedNote[] = [];
  for (const name of await namesIn(folder)) {
    const stored = await readStored(join(folder, name));
    if (!stored.ok || stored.value.note.study.studyInstanceUid !== studyInstanceUid) continue;
    const { reader, completion, verification, changedAt, regions } = stored.value.note;
    found.push({ reader, completion, verification, changedAt, regions: regions.length });
  }
  return found.sort((a, b) => a.reader.localeCompare(b.reader, 'en'));
}

async function namesIn(folder: string): Promise<readonly string[]> {
  try {
    return (await readdir(folder)).sort();
  } catch (error) {
    if (fileErrorCode(error) === 'ENOENT') return [];
    throw error;
  }
}

function holds(condition: SaveCondition, etag: string | undefined): boolean {
  if (condition.kind === 'absent') return etag === undefined;
  return etag !== undefined && condition.etags.includes(etag);
}

function conflict(there: boolean): ReturnType<typeof refuse> {
  return refuse(
    'note-conflict',
    there
      ? 'Another window stored this note meanwhile. Load it again before you go on; your change was not stored.'
      : 'The note that you changed is no longer there. Your change was not stored; save it as a new note.',
  );
}
