import { join } from 'node:path';
import { z } from 'zod';
import { readJsonFile } from '../host/storage/jsonFile.js';
import { ensureOwnerFolder, writeOwnerFile } from '../host/storage/ownerFile.js';
import { createQueue } from '../host/storage/queue.js';

/** What a dialog is for; each remembers its own folder. */
export type Purpose = 'study' | 'export';

const remembered = z.strictObject({ study: z.string().optional(), export: z.string().optional() });

/** Where the reader last was, per purpose. */
export interface LastFolders {
  get(purpose: Purpose): string | undefined;
  set(purpose: Purpose, folder: string): Promise<void>;
  /** Names of folders can identify people: wiped together with the list of recent folders. */
  clear(): Promise<void>;
  /** Resolves when everything that was to be written is on the disk. */
  settled(): Promise<void>;
}

/** Keeps them in `last-folders.json` of a folder. A file that can't be read counts as empty. */
export async function lastFolders(folder: string): Promise<LastFolders> {
  const path = join(folder, 'last-folders.json');
  const stored = await readJsonFile(path, remembered);
  const queue = createQueue();
  let folders: z.infer<typeof remembered> = stored.kind === 'value' ? stored.value : {};

  const keep = (): Promise<void> =>
    queue.run(async () => {
      await ensureOwnerFolder(folder);
      await writeOwnerFile(path, `${JSON.stringify(folders)}\n`);
    });

  return {
    get: (purpose) => folders[purpose],
    set: async (purpose, place) => {
      if (folders[purpose] === place) return;
      folders = { ...folders, [purpose]: place };
      await keep();
    },
    clear: async () => {
      folders = {};
      await keep();
    },
    settled: queue.settled,
  };
}
