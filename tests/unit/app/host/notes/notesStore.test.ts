import { mkdir, readdir, readFile, stat, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { entityTag, noteFolderName } from '../../../../../app/host/notes/noteFolder.js';
import { createNotes } from '../../../../../app/host/notes/notesStore.js';
import { sampleNote } from '../sampleNote.js';
import { temporaryFolder } from '../temporaryFolder.js';

const KEY = { studyInstanceUid: '2.25.77001.1', reader: 'R. Eader' };
const ABSENT = { kind: 'absent' } as const;

test('the entity tag is the SHA-256 of the bytes (FIPS 180-4, example of the message "abc")', () => {
  expect(entityTag(new TextEncoder().encode('abc'))).toBe(
    '"ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad"',
  );
});

test('the folder of a note tells neither study nor reader, and differs for each of them', () => {
  const name = noteFolderName(KEY);
  expect(name).toMatch(/^[0-9a-f]{40}$/);
  expect(noteFolderName({ ...KEY, reader: 'A. Nother' })).not.toBe(name);
  expect(noteFolderName({ ...KEY, studyInstanceUid: '2.25.77001.2' })).not.toBe(name);
  // A reader typed as letter and combining accent is the same reader as one typed with one letter.
  expect(noteFolderName({ ...KEY, reader: 'Rene\u0301' })).toBe(
    noteFolderName({ ...KEY, reader: 'Ren\u00e9 ' }),
  );
});

test('a note that was saved is read back, with the tag that saving gave', async () => {
  const notes = createNotes(await temporaryFolder());
  const saved = await notes.save(sampleNote({ comment: 'first' }), ABSENT);
  const read = await notes.read(KEY);
  expect(saved).toMatchObject({ ok: true, value: { created: true } });
  expect(read).toMatchObject({ ok: true, value: { note: sampleNote({ comment: 'first' }) } });
  expect(read.ok && saved.ok && read.value.etag === saved.value.etag).toBe(true);
});

test('a study without a note is refused as having none', async () => {
  const notes = createNotes(await temporaryFolder());
  expect(await notes.read(KEY)).toMatchObject({ ok: false, refusal: { code: 'no-note' } });
});

test('a save from a stale tag, from no tag and onto a note that is gone changes nothing', async () => {
  const folder = await temporaryFolder();
  const notes = createNotes(folder);
  const first = await notes.save(sampleNote({ comment: 'first' }), ABSENT);
  if (!first.ok) throw new Error(first.refusal.text);
  const { etag } = first.value;
  await notes.save(sampleNote({ comment: 'second' }), { kind: 'unchanged', etags: [etag] });

  const stale = await notes.save(sampleNote({ comment: 'third' }), {
    kind: 'unchanged',
    etags: [etag],
  });
  const again = await notes.save(sampleNote({ comment: 'third' }), ABSENT);
  const gone = await notes.save(sampleNote({ reader: 'A. Nother' }), {
    kind: 'unchanged',
    etags: [etag],
  });

  for (const result of [stale, again, gone]) {
    expect(result).toMatchObject({ ok: false, refusal: { code: 'note-conflict' } });
  }
  expect(await notes.read(KEY)).toMatchObject({ ok: true, value: { note: { comment: 'second' } } });
  expect(await readdir(folder)).toEqual([noteFolderName(KEY)]);
});

test('of two saves at once from one tag exactly one is stored', async () => {
  const notes = createNotes(await temporaryFolder());
  const first = await notes.save(sampleNote(), ABSENT);
  if (!first.ok) throw new Error(first.refusal.text);
  const condition = { kind: 'unchanged', etags: [first.value.etag] } as const;
  const both = await Promise.all([
    notes.save(sampleNote({ comment: 'left' }), condition),
    notes.save(sampleNote({ comment: 'right' }), condition),
  ]);
  expect(both.map((result) => result.ok)).toEqual([true, false]);
});

test('the last 20 earlier versions are kept, oldest dropped first', async () => {
  const folder = await temporaryFolder();
  const notes = createNotes(folder);
  let saved = await notes.save(sampleNote({ comment: '0' }), ABSENT);
  for (let version = 1; version <= 23; version += 1) {
    if (!saved.ok) throw new Error(saved.refusal.text);
    saved = await notes.save(sampleNote({ comment: String(version) }), {
      kind: 'unchanged',
      etags: [saved.value.etag],
    });
  }
  const earlier = join(folder, noteFolderName(KEY), 'earlier');
  const names = (await readdir(earlier)).sort();
  const comments = await Promise.all(
    names.map(async (name) => JSON.parse(await readFile(join(earlier, name), 'utf8')).comment),
  );
  expect(comments).toEqual(Array.from({ length: 20 }, (_, index) => String(index + 3)));
});

test.skipIf(process.platform === 'win32')(
  'files are for the owner alone: 0600 in folders of 0700',
  async () => {
    const folder = join(await temporaryFolder(), 'notes');
    const notes = createNotes(folder);
    const saved = await notes.save(sampleNote(), ABSENT);
    if (!saved.ok) throw new Error(saved.refusal.text);
    await notes.save(sampleNote({ comment: 'b' }), {
      kind: 'unchanged',
      etags: [saved.value.etag],
    });
    const modes: Record<string, string> = {};
    for (const name of ['', ...(await readdir(folder, { recursive: true }))]) {
      const { mode } = await stat(join(folder, name));
      modes[name.replace(noteFolderName(KEY), 'NOTE')] = (mode & 0o777).toString(8);
    }
    expect(modes).toEqual({
      '': '700',
      NOTE: '700',
      'NOTE/earlier': '700',
      'NOTE/earlier/00000001.json': '600',
      'NOTE/note.json': '600',
    });
  },
);

test('no temporary file stays behind', async () => {
  const folder = await temporaryFolder();
  await createNotes(folder).save(sampleNote(), ABSENT);
  expect(await readdir(join(folder, noteFolderName(KEY)))).toEqual(['note.json']);
});

const LEFT_ALONE = [
  ['cut short', '{"format": "diptych-note", "versi', 'note-broken'],
  ['not UTF-8', Buffer.from([0x7b, 0xff, 0x7d]), 'note-broken'],
  ['of another shape', '{"format": "diptych-note", "version": 1}', 'note-broken'],
  ['of a newer version', '{"format": "diptych-note", "version": 2}', 'note-newer'],
] as const;

test.each(LEFT_ALONE)(
  'a stored note that is %s is refused and never overwritten',
  async (_name, content, code) => {
    const folder = await temporaryFolder();
    const place = join(folder, noteFolderName(KEY));
    await mkdir(place);
    await writeFile(join(place, 'note.json'), content);
    const notes = createNotes(folder);
    const etag = entityTag(Buffer.from(content));

    expect(await notes.read(KEY)).toMatchObject({ ok: false, refusal: { code } });
    for (const condition of [ABSENT, { kind: 'unchanged', etags: [etag] } as const]) {
      expect(await notes.save(sampleNote(), condition)).toMatchObject({
        ok: false,
        refusal: { code },
      });
    }
    expect(await readFile(join(place, 'note.json'))).toEqual(Buffer.from(content));
    expect(await readdir(place)).toEqual(['note.json']);
  },
);

test('what is no note is refused with its fault, and nothing is written', async () => {
  const folder = await temporaryFolder();
  const notes = createNotes(folder);
  const broken = { ...sampleNote(), completion: 'DONE' };
  expect(await notes.save(broken, ABSENT)).toMatchObject({
    ok: false,
    refusal: { code: 'note-invalid', text: expect.stringContaining('completion') },
  });
  expect(await readdir(folder)).toEqual([]);
});

test('a field that this version does not know stays in the stored note', async () => {
  const notes = createNotes(await temporaryFolder());
  await notes.save({ ...sampleNote(), later: { more: 1 } }, ABSENT);
  const read = await notes.read(KEY);
  if (!read.ok) throw new Error(read.refusal.text);
  expect(JSON.parse(new TextDecoder().decode(read.value.bytes))).toEqual({
    ...sampleNote(),
    later: { more: 1 },
  });
});

test('a folder that can’t be written gives a refusal that tells to save again', async () => {
  const folder = await temporaryFolder();
  await writeFile(join(folder, 'notes'), 'a file where the folder should be');
  const notes = createNotes(join(folder, 'notes'));
  const saved = await notes.save(sampleNote(), ABSENT);
  expect(saved).toMatchObject({ ok: false });
  expect(!saved.ok && saved.refusal.text).toMatch(/can’t be read|save again/);
});
