import { mkdtemp, readFile, rm, stat, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { folderOf } from '../../../../app/electron/folders.js';
import { lastFolders } from '../../../../app/electron/lastFolders.js';
import { placeFile } from '../../../../app/electron/placeFile.js';

let folder: string;
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'diptych-shell-'));
});
afterEach(() => rm(folder, { recursive: true, force: true }));

const PLACE = {
  bounds: { x: 1, y: 2, width: 1000, height: 700 },
  maximised: true,
  fullScreen: false,
  displayId: 7,
};

describe('placeFile', () => {
  it('has nothing at first, and then what was written last', async () => {
    const file = placeFile(join(folder, 'new'));
    expect(await file.read()).toBeUndefined();
    void file.write({ ...PLACE, maximised: false });
    void file.write(PLACE);
    await file.settled();
    expect(await placeFile(join(folder, 'new')).read()).toEqual(PLACE);
  });

  it.skipIf(process.platform === 'win32')('is for its owner alone', async () => {
    await placeFile(folder).write(PLACE);
    expect((await stat(join(folder, 'window-place.json'))).mode & 0o777).toBe(0o600);
  });

  it.each(['', '{', '[]', '{"bounds":{}}'])('counts %j as nothing', async (text) => {
    await writeFile(join(folder, 'window-place.json'), text);
    expect(await placeFile(folder).read()).toBeUndefined();
  });
});

describe('lastFolders', () => {
  it('remembers one folder per purpose over a restart', async () => {
    const last = await lastFolders(folder);
    expect(last.get('study')).toBeUndefined();
    await last.set('study', '/a');
    await last.set('export', '/b');
    const again = await lastFolders(folder);
    expect([again.get('study'), again.get('export')]).toEqual(['/a', '/b']);
  });

  it('leaves no name behind when it is cleared', async () => {
    const last = await lastFolders(folder);
    await last.set('study', '/patients/somebody');
    await last.clear();
    expect(last.get('study')).toBeUndefined();
    expect(await readFile(join(folder, 'last-folders.json'), 'utf8')).toBe('{}\n');
  });
});

describe('folderOf', () => {
  it('takes a folder as it is, and for a file the folder in which it lies', async () => {
    const file = join(folder, 'slice.dcm');
    await writeFile(file, '');
    expect(await folderOf(folder)).toBe(folder);
    expect(await folderOf(file)).toBe(folder);
  });

  it('leaves a path that is not there to be refused where it is opened', async () => {
    expect(await folderOf(join(folder, 'missing'))).toBe(join(folder, 'missing'));
  });
});
