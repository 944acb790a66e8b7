import { randomBytes } from 'node:crypto';
import { stat } from 'node:fs/promises';
import { join } from 'node:path';
import { z } from 'zod';
import type { RecentFolder } from '../contract.js';
import { fileErrorCode } from '../storage/fileError.js';
import { readJsonFile } from '../storage/jsonFile.js';
import { ensureOwnerFolder, writeOwnerFile } from '../storage/ownerFile.js';
import { createQueue } from '../storage/queue.js';
import { folderName } from './grants.js';

const KEPT = 10;

const StoredSchema = z.array(z.object({ id: z.string(), path: z.string() }));
type Stored = z.infer<typeof StoredSchema>;

/** The folders opened last, latest first, ten at most. Names of folders can tell who was examined. */
export interface Recents {
  list(): Promise<readonly RecentFolder[]>;
  /** Puts a real path first; gives the paths that fell off the end of the list. */
  add(path: string): Promise<readonly string[]>;
  /** The path behind an id of the list. */
  find(id: string): Promise<string | undefined>;
  /** Takes one folder off the list; an unknown id changes nothing. */
  remove(id: string): Promise<void>;
  clear(): Promise<void>;
  settled(): Promise<void>;
}

/** Recent folders in `recent.json` of the given folder. A list that can't be read counts as empty. */
export function createRecents(folder: string): Recents {
  const path = join(folder, 'recent.json');
  const queue = createQueue();

  const read = async (): Promise<Stored> => {
    const stored = await readJsonFile(path, StoredSchema);
    return stored.kind === 'value' ? stored.value : [];
  };
  /** @returns the entries that are gone */
  const change = (edit: (entries: Stored) => Stored): Promise<Stored> =>
    queue.run(async () => {
      await ensureOwnerFolder(folder);
      const before = await read();
      const after = edit(before);
      await writeOwnerFile(path, `${JSON.stringify(after, null, 2)}\n`);
      return before.filter(({ path: gone }) => !after.some((entry) => entry.path === gone));
    });

  return {
    list: () =>
      queue.run(async () =>
        Promise.all(
          (await read()).map(async (entry) => ({
            id: entry.id,
            name: folderName(entry.path),
            missing: !(await isFolder(entry.path)),
          })),
        ),
      ),
    add: async (added) => {
      const gone = await change((entries) => {
        const id =
          entries.find((entry) => entry.path === added)?.id ??
          randomBytes(12).toString('base64url');
        const others = entries.filter((entry) => entry.path !== added);
        return [{ id, path: added }, ...others].slice(0, KEPT);
      });
      return gone.map((entry) => entry.path);
    },
    find: (id) => queue.run(async () => (await read()).find((entry) => entry.id === id)?.path),
    remove: async (id) => {
      await change((entries) => entries.filter((entry) => entry.id !== id));
    },
    clear: async () => {
      await change(() => []);
    },
    settled: queue.settled,
  };
}

async function isFolder(path: string): Promise<boolean> {
  try {
    return (await stat(path)).isDirectory();
  } catch (error) {
    if (fileErrorCode(error) === undefined) throw error;
    return false;
  }
}
