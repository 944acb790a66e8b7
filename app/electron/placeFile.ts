import { join } from 'node:path';
import { readJsonFile } from '../host/storage/jsonFile.js';
import { ensureOwnerFolder, writeOwnerFile } from '../host/storage/ownerFile.js';
import { createQueue } from '../host/storage/queue.js';
import { type WindowPlace, windowPlace } from './windowPlace.js';

/** Keeps the window's place between starts. */
export interface PlaceFile {
  /** Undefined when there is none yet or it can't be read: it is a convenience, never data. */
  read(): Promise<WindowPlace | undefined>;
  write(place: WindowPlace): Promise<void>;
  /** Resolves when everything that was to be written is on the disk. */
  settled(): Promise<void>;
}

/** In `window-place.json` of a folder, written as a whole and in the order asked for. */
export function placeFile(folder: string): PlaceFile {
  const path = join(folder, 'window-place.json');
  const queue = createQueue();
  return {
    read: async () => {
      const stored = await readJsonFile(path, windowPlace);
      return stored.kind === 'value' ? stored.value : undefined;
    },
    write: (place) =>
      queue.run(async () => {
        await ensureOwnerFolder(folder);
        await writeOwnerFile(path, `${JSON.stringify(place)}\n`);
      }),
    settled: queue.settled,
  };
}
