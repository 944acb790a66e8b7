import { appendFile, mkdir, rm, stat, symlink, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { readFrameBytes } from '../../../../../app/host/library/readFrameBytes.js';
import { temporaryFolder } from '../temporaryFolder.js';

test('a file is read whole or in part', async () => {
  const root = await temporaryFolder();
  await writeFile(join(root, 'a'), '0123456789');
  const whole = await readFrameBytes(root, 'a');
  const part = await readFrameBytes(root, 'a', { span: { start: 2, length: 3 } });
  expect(whole.ok && new TextDecoder().decode(whole.value)).toBe('0123456789');
  expect(part.ok && new TextDecoder().decode(part.value)).toBe('234');
});

test('a path that leads out of the folder is refused, by dots and by a link', async () => {
  const root = await temporaryFolder();
  const outside = await temporaryFolder();
  await writeFile(join(outside, 'secret'), 'x');
  await symlink(join(outside, 'secret'), join(root, 'link'));
  for (const path of ['link', '../../../../../../etc/passwd']) {
    expect(await readFrameBytes(root, path)).toMatchObject({
      ok: false,
      refusal: { code: 'outside-folder' },
    });
  }
});

test('a folder whose name only begins alike is outside', async () => {
  const parent = await temporaryFolder();
  await mkdir(join(parent, 'app'));
  await mkdir(join(parent, 'app-other'));
  await writeFile(join(parent, 'app-other', 'file'), 'x');
  expect(await readFrameBytes(join(parent, 'app'), '../app-other/file')).toMatchObject({
    ok: false,
    refusal: { code: 'outside-folder' },
  });
});

test('a file that changed since its header was read is refused', async () => {
  const root = await temporaryFolder();
  await writeFile(join(root, 'a'), '0123');
  const { size, mtimeMs } = await stat(join(root, 'a'));
  const stamp = { size, mtimeMs };
  expect(await readFrameBytes(root, 'a', { stamp })).toMatchObject({ ok: true });
  await appendFile(join(root, 'a'), '4');
  expect(await readFrameBytes(root, 'a', { stamp })).toMatchObject({
    ok: false,
    refusal: { code: 'file-changed' },
  });
});

test('a file that is gone is refused as vanished', async () => {
  const root = await temporaryFolder();
  await writeFile(join(root, 'a'), '0123');
  await rm(join(root, 'a'));
  expect(await readFrameBytes(root, 'a')).toMatchObject({
    ok: false,
    refusal: { code: 'vanished' },
  });
});
