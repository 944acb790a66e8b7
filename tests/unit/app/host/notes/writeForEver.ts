import { createNotes } from '../../../../../app/host/notes/notesStore.js';
import { sampleNote } from '../sampleNote.js';

// A process of its own: stores one version after another and says which one is stored, until it is killed.
const [folder = '', first = '0'] = process.argv.slice(2);
const notes = createNotes(folder);
const note = sampleNote();
const key = { reader: note.reader, studyInstanceUid: note.study.studyInstanceUid };
const before = await notes.read(key);
let etag = before.ok ? before.value.etag : undefined;
for (let version = Number(first); ; version += 1) {
  // Padding makes the write long enough to be cut in the middle.
  const comment = `${version} ${'·'.repeat(20_000 + (version % 7) * 30_000)}`;
  const saved = await notes.save(
    { ...note, comment },
    etag === undefined ? { kind: 'absent' } : { kind: 'unchanged', etags: [etag] },
  );
  if (!saved.ok) throw new Error(saved.refusal.text);
  etag = saved.value.etag;
  process.send?.(version);
}
