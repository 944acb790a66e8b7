import { readFile, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { createSettings, DEFAULT_SETTINGS } from '../../../../app/host/settings.js';
import { temporaryFolder } from './temporaryFolder.js';

test('without a file the defaults hold, and what is written is read back', async () => {
  const settings = createSettings(join(await temporaryFolder(), 'config'));
  expect(await settings.read()).toEqual({ settings: DEFAULT_SETTINGS, remarks: [] });
  const mine = { ...DEFAULT_SETTINGS, reader: 'R. Eader', cautionsAccepted: true };
  await settings.write(mine);
  expect(await settings.read()).toEqual({ settings: mine, remarks: [] });
});

test('a file of another version gives what it has; defaults fill the rest', async () => {
  const folder = await temporaryFolder();
  await writeFile(join(folder, 'settings.json'), '{"theme": "light", "laterField": 1}');
  expect(await createSettings(folder).read()).toEqual({
    settings: { ...DEFAULT_SETTINGS, theme: 'light' },
    remarks: [],
  });
});

test('a broken file gives defaults and a remark, and is kept when settings are written', async () => {
  const folder = await temporaryFolder();
  await writeFile(join(folder, 'settings.json'), '{"theme": ');
  const settings = createSettings(folder);
  expect(await settings.read()).toMatchObject({
    settings: DEFAULT_SETTINGS,
    remarks: [{ code: 'settings-broken' }],
  });
  await settings.write({ ...DEFAULT_SETTINGS, theme: 'dark' });
  expect(await readFile(join(folder, 'settings.broken.json'), 'utf8')).toBe('{"theme": ');
  expect(await settings.read()).toMatchObject({ settings: { theme: 'dark' }, remarks: [] });
});
