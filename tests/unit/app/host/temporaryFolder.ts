import { mkdtemp, realpath, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { onTestFinished } from 'vitest';

/** An empty folder that is removed when the test has finished; its real path. */
export async function temporaryFolder(): Promise<string> {
  const folder = await realpath(await mkdtemp(join(tmpdir(), 'diptych-test-')));
  onTestFinished(() => rm(folder, { recursive: true, force: true }));
  return folder;
}
