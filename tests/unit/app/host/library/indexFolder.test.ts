import { mkdir, rm, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import type { Progress } from '../../../../../app/host/contract.js';
import { indexFolder } from '../../../../../app/host/library/indexFolder.js';
import { ctSlice } from '../../../../corpus/ctSlice.js';
import { studyFolder } from '../hostForTest.js';
import { temporaryFolder } from '../temporaryFolder.js';

test('a folder gives its stack, and every other file with its reason', async () => {
  const folder = await studyFolder(await temporaryFolder());
  await writeFile(join(folder, 'empty'), '');
  await writeFile(join(folder, 'notes.txt'), 'no image');
  await mkdir(join(folder, 'more'));
  await writeFile(join(folder, 'more', 'cut.dcm'), ctSlice({ number: 9, z: 9 }).subarray(0, 400));
  const index = await indexFolder(folder, { threads: 0 });
  if (!index.ok) throw new Error(index.refusal.text);
  expect(index.value.files).toBe(6);
  expect(index.value.paths).toEqual([
    'empty',
    'notes.txt',
    'slice1.dcm',
    'slice2.dcm',
    'slice3.dcm',
    'more/cut.dcm',
  ]);
  expect(index.value.stacks).toHaveLength(1);
  expect(
    index.value.stacks[0]?.slices.map(({ file, fileId, alongMm }) => [file, fileId, alongMm]),
  ).toEqual([
    ['slice1.dcm', 2, 0.5],
    ['slice2.dcm', 3, 1],
    ['slice3.dcm', 4, 1.5],
  ]);
  expect(index.value.leftOut.map(({ file }) => file)).toEqual([
    'empty',
    'more/cut.dcm',
    'notes.txt',
  ]);
  expect(index.value.leftOut[0]).toEqual({
    file: 'empty',
    code: 'empty-file',
    text: 'Empty file: it holds no bytes.',
  });
});

test('a header longer than the first read is read with more of the file', async () => {
  const folder = await temporaryFolder();
  // A private text of 100 kB before the geometry (PS3.5 section 7.8.1: odd group, its creator first).
  const long = { tag: 0x00191010, vr: 'UN', value: new Uint8Array(100_000) } as const;
  const creator = { tag: 0x00190010, vr: 'LO', value: 'CORPUS' } as const;
  await writeFile(
    join(folder, 'long.dcm'),
    ctSlice({ change: { 1638416: creator, 1642512: long } }),
  );
  const index = await indexFolder(folder, { threads: 0 });
  expect(index).toMatchObject({
    ok: true,
    value: { files: 1, leftOut: [], stacks: [{ unit: 'HU' }] },
  });
});

test('a file keeps its number when the folder is read again', async () => {
  const folder = await studyFolder(await temporaryFolder());
  const first = await indexFolder(folder, { threads: 0 });
  if (!first.ok) throw new Error(first.refusal.text);
  await writeFile(join(folder, 'a-new.dcm'), ctSlice({ number: 7, z: 2 }));
  await rm(join(folder, 'slice1.dcm'));
  const second = await indexFolder(folder, { threads: 0, known: first.value.paths });
  if (!second.ok) throw new Error(second.refusal.text);
  expect(second.value.paths).toEqual(['slice1.dcm', 'slice2.dcm', 'slice3.dcm', 'a-new.dcm']);
  expect(second.value.stamps[0]).toBeUndefined();
  expect(second.value.stacks[0]?.slices.map(({ file, fileId }) => [file, fileId])).toEqual([
    ['slice2.dcm', 1],
    ['slice3.dcm', 2],
    ['a-new.dcm', 3],
  ]);
});

test('progress ends with all files read', async () => {
  const folder = await studyFolder(await temporaryFolder());
  const told: Progress[] = [];
  await indexFolder(folder, { threads: 0, onProgress: (progress) => told.push(progress) });
  expect(told.at(-1)).toEqual({ done: 3, total: 3, text: 'Reading headers: 3 of 3' });
});

test('cancelling in the middle of the work ends it', async () => {
  const folder = await temporaryFolder();
  for (let number = 0; number < 100; number += 1) {
    await writeFile(join(folder, `${number}.txt`), 'no image');
  }
  const cancel = new AbortController();
  const index = await indexFolder(folder, {
    threads: 0,
    signal: cancel.signal,
    onProgress: () => cancel.abort(),
  });
  expect(index).toMatchObject({ ok: false, refusal: { code: 'cancelled' } });
});

test('a file instead of a folder is refused', async () => {
  const folder = await studyFolder(await temporaryFolder());
  expect(await indexFolder(join(folder, 'slice1.dcm'), { threads: 0 })).toMatchObject({
    ok: false,
    refusal: { code: 'not-a-folder' },
  });
});
