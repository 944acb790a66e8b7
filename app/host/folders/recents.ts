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
  /** Puts a real path first. */
  add(path: string): Promise<void>;
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
  const change = (edit: (entries: Stored) => Stored): Promise<void> =>
    queue.run(async () => {
      await ensureOwnerFolder(folder);
      await writeOwnerFile(path, `${JSON.stringify(edit(await read()), null, 2)}\n`);
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
    add: (added) =>
      change((entries) => {
        const id =
          entries.find((entry) => entry.path === added)?.id ??
          randomBytes(12).toString('base64url');
        const others = entries.filter((entry) => entry.path !== added);
        return [{ id, path: added }, ...others].slice(0, KEPT);
      }),
    find: (id) => queue.run(async () => (await read()).find((entry) => entry.id === id)?.path),
    remove: (id) => change((entries) => entries.filter((entry) => entry.id !== id)),
    clear: () => change(() => []),
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
