import { execFileSync } from 'node:child_process';
import { chmod, mkdir, symlink, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { DEEPEST, scanFolder } from '../../../../../app/host/library/scan.js';
import { temporaryFolder } from '../temporaryFolder.js';

const isRoot = process.getuid?.() === 0;
const isWindows = process.platform === 'win32';

test('files are listed folder by folder in the order of their names', async () => {
  const root = await temporaryFolder();
  await mkdir(join(root, 'b', 'inner'), { recursive: true });
  await mkdir(join(root, 'a'));
  for (const file of ['z', 'b/2', 'b/10', 'b/inner/x', 'a/1'])
    await writeFile(join(root, file), '');
  expect(await scanFolder(root)).toEqual({
    ok: true,
    value: { files: ['z', 'a/1', 'b/10', 'b/2', 'b/inner/x'], leftOut: [], seen: 5 },
  });
});

test.skipIf(isWindows)('links are left out, each with its reason, and loops end', async () => {
  const root = await temporaryFolder();
  const outside = await temporaryFolder();
  await mkdir(join(root, 'sub'));
  await writeFile(join(root, 'sub', 'file'), '');
  await symlink('..', join(root, 'sub', 'up'));
  await symlink('nowhere', join(root, 'dangling'));
  await symlink('circle', join(root, 'circle'));
  await symlink(outside, join(root, 'out'));
  await symlink('/etc/passwd', join(root, 'outfile'));
  await symlink('sub/file', join(root, 'same'));
  const scan = await scanFolder(root);
  if (!scan.ok) throw new Error(scan.refusal.text);
  expect(scan.value.files).toEqual(['sub/file']);
  expect(scan.value.seen).toBe(7);
  expect(Object.fromEntries(scan.value.leftOut.map(({ file, code }) => [file, code]))).toEqual({
    circle: 'link-loop',
    dangling: 'dangling-link',
    out: 'link-outside',
    outfile: 'link-outside',
    same: 'link',
    'sub/up': 'link',
  });
});

test.skipIf(isRoot || isWindows)(
  'a folder without permission is left out and the scan goes on',
  async () => {
    const root = await temporaryFolder();
    await mkdir(join(root, 'closed'));
    await writeFile(join(root, 'file'), '');
    await chmod(join(root, 'closed'), 0);
    const scan = await scanFolder(root);
    await chmod(join(root, 'closed'), 0o700);
    expect(scan).toMatchObject({
      ok: true,
      value: { files: ['file'], leftOut: [{ file: 'closed/', code: 'unreadable-folder' }] },
    });
  },
);

test.skipIf(isWindows)('a pipe is left out and not opened, which would wait for ever', async () => {
  const root = await temporaryFolder();
  execFileSync('mkfifo', [join(root, 'pipe')]);
  expect(await scanFolder(root)).toMatchObject({
    ok: true,
    value: { files: [], leftOut: [{ file: 'pipe', code: 'special-file' }], seen: 1 },
  });
});

test('folders deeper than the bound are left out', async () => {
  const root = await temporaryFolder();
  const deep = Array.from({ length: DEEPEST + 1 }, () => 'd');
  await mkdir(join(root, ...deep), { recursive: true });
  await writeFile(join(root, ...deep, 'file'), '');
  await writeFile(join(root, ...deep.slice(1), 'file'), '');
  const scan = await scanFolder(root);
  expect(scan).toMatchObject({
    ok: true,
    value: {
      files: [`${deep.slice(1).join('/')}/file`],
      leftOut: [{ file: `${deep.join('/')}/`, code: 'too-deep' }],
    },
  });
});

test('a scan that was cancelled is refused', async () => {
  const root = await temporaryFolder();
  expect(await scanFolder(root, { signal: AbortSignal.abort() })).toMatchObject({
    ok: false,
    refusal: { code: 'cancelled' },
  });
});

test('a folder that is gone is refused', async () => {
  const root = await temporaryFolder();
  expect(await scanFolder(join(root, 'gone'))).toMatchObject({
    ok: false,
    refusal: { code: 'unreadable-folder' },
  });
});
