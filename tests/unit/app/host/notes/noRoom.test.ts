import { execFileSync } from 'node:child_process';
import { chmodSync, mkdtempSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { build } from 'vite';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { createNotes } from '../../../../../app/host/notes/notesStore.js';
import { sampleNote } from '../sampleNote.js';

const NOBODY = 65_534;
const isRoot = process.getuid?.() === 0;

let built = '';

beforeAll(async () => {
  built = mkdtempSync(join(tmpdir(), 'no-room-'));
  chmodSync(built, 0o755);
  await build({
    configFile: false,
    logLevel: 'silent',
    build: {
      ssr: join(import.meta.dirname, 'writeOnce.ts'),
      outDir: built,
      rolldownOptions: { output: { entryFileNames: 'once.mjs' } },
    },
    ssr: { noExternal: true },
  });
});

afterAll(() => rmSync(built, { recursive: true }));

/** A notes folder with one small note in it. */
async function stored(): Promise<string> {
  const folder = mkdtempSync(join(tmpdir(), 'notes-'));
  const saved = await createNotes(folder).save(sampleNote({ comment: 'kept' }), { kind: 'absent' });
  if (!saved.ok) throw new Error(saved.refusal.text);
  return folder;
}

async function expectKept(folder: string): Promise<void> {
  const note = sampleNote();
  const key = { reader: note.reader, studyInstanceUid: note.study.studyInstanceUid };
  const read = await createNotes(folder).read(key);
  expect(read.ok && read.value.note.comment).toBe('kept');
  const names = readdirSync(folder, { recursive: true, encoding: 'utf8' });
  expect(names.filter((name) => name.endsWith('.tmp'))).toEqual([]);
  rmSync(folder, { recursive: true });
}

it('a note for which there is no room is refused with a sentence, and the stored one is kept', async () => {
  const folder = await stored();
  // The system’s limit on the size of a file stands in for a full disk: the write ends in the middle.
  const said = execFileSync('/bin/bash', [
    '-c',
    `ulimit -f 50; exec "${process.execPath}" "${join(built, 'once.mjs')}" "${folder}"`,
  ]).toString();
  expect(JSON.parse(said)).toEqual({
    code: 'note-not-written',
    text: 'The note could not be stored: a file may not grow so large here. Keep this window open and save again.',
  });
  await expectKept(folder);
});

it.skipIf(!isRoot)(
  'a folder that may not be written to is told, and the stored note is kept',
  async () => {
    const folder = await stored();
    for (const name of ['', ...readdirSync(folder)]) chmodSync(join(folder, name), 0o755);
    for (const name of readdirSync(folder, { recursive: true, encoding: 'utf8' })) {
      chmodSync(join(folder, name), name.endsWith('.json') ? 0o644 : 0o755);
    }
    const said = execFileSync(process.execPath, [join(built, 'once.mjs'), folder, `${NOBODY}`]);
    expect(JSON.parse(said.toString())).toMatchObject({
      code: 'note-not-written',
      text: expect.stringContaining('no permission'),
    });
    await expectKept(folder);
  },
);
