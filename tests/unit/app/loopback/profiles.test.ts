import { spawnSync } from 'node:child_process';
import { mkdir, readdir, stat, symlink, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { makeProfile, removeProfile, sweepProfiles } from '../../../../app/loopback/profiles.js';
import { temporaryFolder } from '../host/temporaryFolder.js';

/** Number of a process that has ended. */
function endedProcess(): number {
  return spawnSync(process.execPath, ['-e', '']).pid;
}

test.skipIf(process.platform === 'win32')('a profile is for its owner alone', async () => {
  const profile = await makeProfile(await temporaryFolder());
  expect(((await stat(profile)).mode & 0o777).toString(8)).toBe('700');
});

test('only profiles of our own whose program and browser have ended are swept', async () => {
  const parent = await temporaryFolder();
  const live = await makeProfile(parent);
  const gone = String(endedProcess());
  for (const name of [
    'diptych-window-old',
    'diptych-window-busy',
    'diptych-window-none',
    'other',
  ]) {
    await mkdir(join(parent, name));
  }
  for (const name of ['diptych-window-old', 'diptych-window-busy', 'other']) {
    await writeFile(join(parent, name, 'owner.pid'), gone);
  }
  await symlink(`host-${process.pid}`, join(parent, 'diptych-window-busy', 'SingletonLock'));
  await symlink(`host-${gone}`, join(parent, 'diptych-window-old', 'SingletonLock'));
  await symlink(parent, join(parent, 'diptych-window-link'));

  expect(await sweepProfiles(parent)).toBe(1);
  expect((await readdir(parent)).sort()).toEqual(
    [
      live.slice(parent.length + 1),
      'diptych-window-busy',
      'diptych-window-link',
      'diptych-window-none',
      'other',
    ].sort(),
  );
});

test('removing a profile twice is no failure', async () => {
  const profile = await makeProfile(await temporaryFolder());
  await removeProfile(profile);
  await removeProfile(profile);
});
