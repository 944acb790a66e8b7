import { createNotes } from '../../../../../app/host/notes/notesStore.js';
import { sampleNote } from '../sampleNote.js';

// A process of its own: tries to replace a stored note by a long one, and says what came of it.
const [folder = '', user = ''] = process.argv.slice(2);
// A user who may not write there, where the tests run as root.
if (user !== '') process.setuid?.(Number(user));
const notes = createNotes(folder);
const note = sampleNote({ comment: 'x'.repeat(200_000) });
const key = { reader: note.reader, studyInstanceUid: note.study.studyInstanceUid };
const before = await notes.read(key);
const etags = before.ok ? [before.value.etag] : [];
const saved = await notes.save(
  note,
  etags.length === 0 ? { kind: 'absent' } : { kind: 'unchanged', etags },
);
process.stdout.write(JSON.stringify(saved.ok ? { ok: true } : saved.refusal));
