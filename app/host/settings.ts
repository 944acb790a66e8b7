import { rename } from 'node:fs/promises';
import { join } from 'node:path';
import { z } from 'zod';
import type { Finding } from '../../core/result.js';
import type { Settings } from './contract.js';
import { readJsonFile } from './storage/jsonFile.js';
import { ensureOwnerFolder, writeOwnerFile } from './storage/ownerFile.js';
import { createQueue } from './storage/queue.js';

/** Settings as the page sends them. */
export const SettingsSchema = z.strictObject({
  cautionsAccepted: z.boolean(),
  theme: z.enum(['system', 'dark', 'light']),
  letterKeys: z.boolean(),
  reader: z.string().trim().max(200),
}) satisfies z.ZodType<Settings>;

/** What holds before the reader has set anything. */
export const DEFAULT_SETTINGS: Settings = {
  cautionsAccepted: false,
  theme: 'dark',
  letterKeys: true,
  reader: '',
};

/** As stored: a file of an older program lacks some, one of a newer program has more. */
const StoredSchema = SettingsSchema.partial()
  .strip()
  .transform((stored) => ({
    cautionsAccepted: stored.cautionsAccepted ?? DEFAULT_SETTINGS.cautionsAccepted,
    theme: stored.theme ?? DEFAULT_SETTINGS.theme,
    letterKeys: stored.letterKeys ?? DEFAULT_SETTINGS.letterKeys,
    reader: stored.reader ?? DEFAULT_SETTINGS.reader,
  }));

const BROKEN: Finding = {
  code: 'settings-broken',
  text: 'The stored settings could not be read, so the usual ones are used. When you change a setting, the old file is kept as settings.broken.json.',
};

/** The reader's settings on this machine. */
export interface SettingsStore {
  /** The settings, and a remark when the file could not be read. */
  read(): Promise<{ readonly settings: Settings; readonly remarks: readonly Finding[] }>;
  /** Stores all settings at once. A file that could not be read is kept beside it as settings.broken.json. */
  write(settings: Settings): Promise<void>;
  settled(): Promise<void>;
}

/** Settings in `settings.json` of the given folder. */
export function createSettings(folder: string): SettingsStore {
  const path = join(folder, 'settings.json');
  const queue = createQueue();
  return {
    read: () =>
      queue.run(async () => {
        const stored = await readJsonFile(path, StoredSchema);
        if (stored.kind === 'value') return { settings: stored.value, remarks: [] };
        return { settings: DEFAULT_SETTINGS, remarks: stored.kind === 'broken' ? [BROKEN] : [] };
      }),
    write: (settings) =>
      queue.run(async () => {
        await ensureOwnerFolder(folder);
        if ((await readJsonFile(path, StoredSchema)).kind === 'broken') {
          await rename(path, join(folder, 'settings.broken.json'));
        }
        await writeOwnerFile(path, `${JSON.stringify(SettingsSchema.parse(settings), null, 2)}\n`);
      }),
    settled: queue.settled,
  };
}
