import { spawn } from 'node:child_process';
import { fileErrorCode } from '../host/storage/fileError.js';
import { browserFlags } from './browserFlags.js';
import { makeProfile, removeProfile } from './profiles.js';

/** A browser that was started for one window. */
export interface AppWindow {
  /** Resolves when the browser has ended, however it did, and its profile is gone. */
  readonly ended: Promise<void>;
  /** Asks the browser to end. Only this one child is ended, never another window of the same browser. */
  close(): void;
}

/** Opens the page as an application window of the given browser, with a profile of its own. Rejects when it can't start. */
export async function openAppWindow(browser: string, address: string): Promise<AppWindow> {
  const profile = await makeProfile();
  const root = process.getuid?.() === 0;
  const child = spawn(browser, browserFlags({ address, profile, root }), { stdio: 'ignore' });
  // Listened to from the start: a browser that ends at once must not end unheard.
  const exit = new Promise<void>((resolve) => child.once('exit', () => resolve()));
  try {
    await new Promise<void>((resolve, reject) => {
      child.once('spawn', resolve);
      child.once('error', reject);
    });
  } catch (error) {
    await removeProfile(profile);
    throw error;
  }
  return {
    ended: exit.then(() => removeIfPossible(profile)),
    close() {
      child.kill('SIGTERM');
    },
  };
}

/** A helper of the browser may still hold a file; what stays is swept at the next start. */
async function removeIfPossible(profile: string): Promise<void> {
  try {
    await removeProfile(profile);
  } catch (error) {
    if (fileErrorCode(error) === undefined) throw error;
  }
}
