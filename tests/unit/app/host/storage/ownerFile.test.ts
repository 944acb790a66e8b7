import { mkdir, readdir, readFile, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { writeOwnerFile } from '../../../../../app/host/storage/ownerFile.js';
import { temporaryFolder } from '../temporaryFolder.js';

test('a file is replaced whole', async () => {
  const folder = await temporaryFolder();
  await writeFile(join(folder, 'a'), 'much longer than what comes');
  await writeOwnerFile(join(folder, 'a'), 'new');
  expect(await readFile(join(folder, 'a'), 'utf8')).toBe('new');
});

test('a write that fails leaves what was there, and no temporary file', async () => {
  const folder = await temporaryFolder();
  await mkdir(join(folder, 'a', 'inside'), { recursive: true });
  // A folder with something in it can't be replaced by a file (POSIX rename: EISDIR or ENOTEMPTY).
  await expect(writeOwnerFile(join(folder, 'a'), 'new')).rejects.toMatchObject({
    syscall: 'rename',
  });
  expect(await readdir(folder)).toEqual(['a']);
  expect(await readdir(join(folder, 'a'))).toEqual(['inside']);
});
