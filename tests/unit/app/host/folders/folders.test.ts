import { mkdir, rm, symlink, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { createChooser } from '../../../../../app/host/folders/chooser.js';
import { createGrants } from '../../../../../app/host/folders/grants.js';
import { createRecents } from '../../../../../app/host/folders/recents.js';
import { temporaryFolder } from '../temporaryFolder.js';

test('a folder opened by a link and by its name has one grant, on its real path', async () => {
  const home = await temporaryFolder();
  await mkdir(join(home, 'a'));
  await mkdir(join(home, 'b'));
  await symlink(join(home, 'a'), join(home, 'link'));
  const grants = createGrants();
  const first = await grants.open(join(home, 'a'));
  await grants.open(join(home, 'b'));
  const again = await grants.open(join(home, 'link'));
  expect(again).toEqual(first);
  expect(grants.list().map(({ name }) => name)).toEqual(['b', 'a']);
  expect(first.ok && grants.find(first.value.grant)?.root).toBe(join(home, 'a'));
  expect(grants.find('unknown')).toBeUndefined();
});

test('a file and a folder that is not there are refused in words', async () => {
  const home = await temporaryFolder();
  await writeFile(join(home, 'file'), '');
  const grants = createGrants();
  expect(await grants.open(join(home, 'file'))).toMatchObject({
    refusal: { code: 'not-a-folder', text: 'file is a file. Open the folder that holds it.' },
  });
  expect(await grants.open(join(home, 'gone'))).toMatchObject({
    refusal: { code: 'folder-not-opened', text: 'gone can’t be opened: it is not there.' },
  });
});

test('recent folders: latest first, each once, ten at most, over restarts', async () => {
  const folder = await temporaryFolder();
  const recents = createRecents(folder);
  for (let number = 1; number <= 12; number += 1) await recents.add(join(folder, String(number)));
  await recents.add(join(folder, '5'));
  const list = await createRecents(folder).list();
  expect(list.map(({ name }) => name)).toEqual([
    '5',
    '12',
    '11',
    '10',
    '9',
    '8',
    '7',
    '6',
    '4',
    '3',
  ]);
  expect(list.every(({ missing }) => missing)).toBe(true);
});

test('the chooser lists names of folders only, in the order of their numbers', async () => {
  const home = await temporaryFolder();
  for (const name of ['b10', 'b9', 'A', '.hidden']) await mkdir(join(home, name));
  await writeFile(join(home, 'file.dcm'), '');
  const level = await createChooser(home).level();
  expect(level?.children.map(({ name }) => name)).toEqual(['A', 'b9', 'b10']);
  expect(level?.roots?.[0]?.name).toBe('Home');
  expect(level?.trail.at(-1)).toEqual({ id: level?.id, name: level?.name });
  expect(JSON.stringify(level)).not.toContain(home);
});

test('one level leads to the next, and a folder that is gone says so', async () => {
  const home = await temporaryFolder();
  await mkdir(join(home, 'a', 'inner'), { recursive: true });
  const chooser = createChooser(home);
  const top = await chooser.level();
  const inner = await chooser.level(top?.children[0]?.id);
  expect(inner?.name).toBe('a');
  expect(inner?.children.map(({ name }) => name)).toEqual(['inner']);
  expect(await chooser.level('/etc')).toBeUndefined();
  await rm(join(home, 'a'), { recursive: true });
  expect(await chooser.level(top?.children[0]?.id)).toMatchObject({
    children: [],
    refusal: 'a can’t be opened: it is not there.',
  });
});
