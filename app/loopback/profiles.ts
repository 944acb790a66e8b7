import { lstat, mkdtemp, readdir, readFile, readlink, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileErrorCode } from '../host/storage/fileError.js';

const PREFIX = 'diptych-window-';
const OWNER = 'owner.pid';

/** Makes a browser profile for one window, for its owner alone (mode 0700), and notes whose it is. */
export async function makeProfile(parent: string = tmpdir()): Promise<string> {
  const profile = await mkdtemp(join(parent, PREFIX));
  await writeFile(join(profile, OWNER), String(process.pid), { mode: 0o600 });
  return profile;
}

/** Removes a profile; the browser may still be closing files of it. */
export async function removeProfile(profile: string): Promise<void> {
  await rm(profile, { recursive: true, force: true, maxRetries: 5, retryDelay: 100 });
}

/**
 * Removes profiles that earlier starts left behind: of this user, by this program, whose program and
 * browser no longer run. Returns the number of those removed.
 */
export async function sweepProfiles(parent: string = tmpdir()): Promise<number> {
  let removed = 0;
  for (const name of await readdir(parent)) {
    if (!name.startsWith(PREFIX)) continue;
    const profile = join(parent, name);
    if (!(await isLeftBehind(profile))) continue;
    await removeProfile(profile);
    removed += 1;
  }
  return removed;
}

async function isLeftBehind(profile: string): Promise<boolean> {
  try {
    const stats = await lstat(profile);
    if (!stats.isDirectory()) return false;
    if (process.getuid !== undefined && stats.uid !== process.getuid()) return false;
    const owner = Number(await readFile(join(profile, OWNER), 'utf8'));
    return !isRunning(owner) && !(await hasBrowser(profile));
  } catch (error) {
    // Another start may be making or removing it at this moment: then it is not left behind.
    if (fileErrorCode(error) === undefined) throw error;
    return false;
  }
}

/** Chromium marks a profile in use by a link whose target ends in its process number. Windows has no such link. */
async function hasBrowser(profile: string): Promise<boolean> {
  try {
    const target = await readlink(join(profile, 'SingletonLock'));
    const browser = /-(\d+)$/.exec(target)?.[1];
    return browser === undefined || isRunning(Number(browser));
  } catch (error) {
    if (fileErrorCode(error) === 'ENOENT') return false;
    throw error;
  }
}

function isRunning(processId: number): boolean {
  if (!Number.isInteger(processId) || processId <= 0) return false;
  try {
    process.kill(processId, 0);
    return true;
  } catch (error) {
    return fileErrorCode(error) === 'EPERM';
  }
}
