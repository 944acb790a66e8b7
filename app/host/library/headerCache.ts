import { createHash } from 'node:crypto';
import { lstat, open, readdir, rm, utimes } from 'node:fs/promises';
import { join } from 'node:path';
import { fileErrorCode } from '../storage/fileError.js';
import { ensureOwnerFolder, writeOwnerFile } from '../storage/ownerFile.js';
import { createQueue } from '../storage/queue.js';
import { type CachedReadings, cacheText, readingsOfCache } from './cachedHeaders.js';
import { OPEN_FLAGS } from './readFileHeader.js';

/**
 * What was read of the headers of folders, so that a folder that did not change opens at once. The files
 * hold what headers say of patients; they are for their owner alone and can be deleted at any time.
 */
export interface HeaderCache {
  /** Readings kept for a folder, given by its real path; none when there are none that can be believed. */
  read(root: string): Promise<CachedReadings>;
  /**
   * Keeps readings in place of those that were kept. Returns at once. A folder that was forgotten since it was asked
   * for stays forgotten, also when its reading was under way.
   */
  write(root: string, readings: CachedReadings): void;
  forget(root: string): Promise<void>;
  clear(): Promise<void>;
  settled(): Promise<void>;
}

export interface HeaderCacheOptions {
  readonly folder: string;
  /** Names the program that reads headers: what another one has read is not believed. */
  readonly reader: string;
  /** Hears of a cache that could not be written. Nothing else suffers from it. */
  readonly report: (error: unknown) => void;
  /** Bytes that one folder's cache may have; and all together, the latest used staying. */
  readonly limits?: { readonly one: number; readonly all: number };
}

/** A cache of 32 MiB holds some 80,000 slices. */
const LIMITS = { one: 32 << 20, all: 128 << 20 } as const;

/** A name of one of our files; nothing else in the folder is ever deleted. */
const FILE_NAME = /^[0-9a-f]{32}\.json(\.[0-9a-f]{12}\.tmp)?$/;

/** Readings in a folder of the cache's own, one file for each folder that was read. */
export function createHeaderCache(options: HeaderCacheOptions): HeaderCache {
  const { folder, reader, report, limits = LIMITS } = options;
  const queue = createQueue();
  const fileOf = (root: string): string =>
    join(folder, `${createHash('sha256').update(root).digest('hex').slice(0, 32)}.json`);

  /** Folders that were asked for and not forgotten since: only of these are readings kept. */
  const wanted = new Set<string>();

  const removeOldest = async (): Promise<void> => {
    const files = await listFiles(folder);
    files.sort((a, b) => b.usedMs - a.usedMs);
    let bytes = 0;
    for (const { path, size } of files) {
      bytes += size;
      if (bytes > limits.all) await rm(path, { force: true });
    }
  };

  return {
    read: (root) => {
      wanted.add(root);
      return queue.run(async () => {
        const path = fileOf(root);
        const text = await readAtMost(path, limits.one);
        if (text === undefined) return new Map();
        const readings = readingsOfCache(text, { root, reader });
        if (readings.size > 0) await touch(path);
        return readings;
      });
    },
    write: (root, readings) => {
      queue
        .run(async () => {
          if (!wanted.has(root)) return;
          const path = fileOf(root);
          const text = cacheText({ root, reader }, readings);
          if (readings.size === 0 || Buffer.byteLength(text) > limits.one) {
            return rm(path, { force: true });
          }
          await ensureOwnerFolder(folder);
          await writeOwnerFile(path, text);
          await removeOldest();
        })
        .catch(report);
    },
    forget: (root) => {
      wanted.delete(root);
      return queue.run(() => rm(fileOf(root), { force: true }));
    },
    clear: () => {
      wanted.clear();
      return queue.run(async () => {
        for (const { path } of await listFiles(folder)) await rm(path, { force: true });
      });
    },
    settled: queue.settled,
  };
}

interface CacheFile {
  readonly path: string;
  readonly size: number;
  readonly usedMs: number;
}

async function listFiles(folder: string): Promise<CacheFile[]> {
  const files: CacheFile[] = [];
  for (const name of (await ifThere(readdir(folder))) ?? []) {
    const path = join(folder, name);
    const found = FILE_NAME.test(name) ? await ifThere(lstat(path)) : undefined;
    if (found !== undefined) files.push({ path, size: found.size, usedMs: found.mtimeMs });
  }
  return files;
}

/** Undefined for what is not there: another window of the program may be tidying up at the same time. */
async function ifThere<T>(asked: Promise<T>): Promise<T | undefined> {
  try {
    return await asked;
  } catch (error) {
    if (fileErrorCode(error) === 'ENOENT') return undefined;
    throw error;
  }
}

/** The text of an ordinary file of at most so many bytes; undefined where there is none that can be read. */
async function readAtMost(path: string, most: number): Promise<string | undefined> {
  try {
    const file = await open(path, OPEN_FLAGS);
    try {
      const found = await file.stat();
      if (!found.isFile() || found.size > most) return undefined;
      return await file.readFile('utf8');
    } finally {
      await file.close();
    }
  } catch (error) {
    if (fileErrorCode(error) === undefined) throw error;
    return undefined;
  }
}

/** Marks a cache as used now. On a disk that can only be read it stays as it is. */
async function touch(path: string): Promise<void> {
  const now = new Date();
  try {
    await utimes(path, now, now);
  } catch (error) {
    if (fileErrorCode(error) === undefined) throw error;
  }
}
