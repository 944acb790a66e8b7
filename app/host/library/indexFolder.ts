import { basename, join } from 'node:path';
import type { ReadOptions } from '../../../core/dicom/index.js';
import { type Result, success } from '../../../core/result.js';
import {
  buildStacks,
  type FolderIndex,
  type IndexedImage,
  type LeftOut,
} from '../../../core/stack/index.js';
import { realFolder } from '../folders/grants.js';
import type { JobOptions } from '../services.js';
import type { CachedReadings, LastingReading } from './cachedHeaders.js';
import { cancelled, isCancelled } from './cancelled.js';
import type { HeaderCache } from './headerCache.js';
import { createHeaderReader, type HeaderReader, usualThreads } from './headerReader.js';
import { withPixelDigests } from './pixelDigests.js';
import { createSharing } from './readBatch.js';
import type { FileReading, FileStamp } from './readFileHeader.js';
import { scanFolder } from './scan.js';
import { unchangedFiles } from './unchangedFiles.js';

/** Files a message: few enough to tell progress, enough that the messages cost nothing beside the reading. */
const BATCH = 32;

/**
 * A file that changed so shortly before it was read could change again without a trace: some file systems
 * tell times in steps of two seconds. Its reading is not kept.
 */
const SETTLED_MS = 2000;

/** How a folder is indexed. */
export interface IndexOptions extends JobOptions, ReadOptions {
  /** Worker threads; 0 reads in this thread. By default as many as there are processors, four at most. */
  readonly threads?: number;
  /** A reader to be used instead of threads of its own. It is not closed here. */
  readonly reader?: HeaderReader;
  /** Paths of an earlier index of this folder: a file that is still there keeps its number. */
  readonly known?: readonly string[];
  /** What was read of folders before. A file that is in the same state is not opened. */
  readonly cache?: Pick<HeaderCache, 'read' | 'write'> | undefined;
  /** Present time, ms since 1970; the system's by default. */
  readonly now?: () => number;
}

/** An index, with what it takes to open its files. */
export interface IndexedFolder extends FolderIndex {
  /** Real path of the folder. */
  readonly root: string;
  /** Path of each file by its number (`fileId`), relative to the folder, '/' between names. */
  readonly paths: readonly string[];
  /** Size and time of each file when its header was read; undefined where it could not be opened. */
  readonly stamps: readonly (FileStamp | undefined)[];
}

/**
 * Finds out what a folder holds: every file's header is read, slices are sorted into stacks, and what is
 * no slice is left out with its reason. Refused only when the folder itself can't be read or on cancel.
 */
export async function indexFolder(
  directory: string,
  given: IndexOptions = {},
): Promise<Result<IndexedFolder>> {
  // What is kept was read as the files say.
  const options = given.characterSet === undefined ? given : { ...given, cache: undefined };
  const root = await realFolder(directory);
  if (!root.ok) return root;
  const scan = await scanFolder(root.value, options);
  if (!scan.ok) return scan;
  const { files, seen } = scan.value;

  const kept = (await options.cache?.read(root.value)) ?? new Map<string, LastingReading>();
  const begun = (options.now ?? Date.now)();
  const readings = await readAll(root.value, files, kept, options);
  if (readings === undefined) return cancelled();
  if (options.cache !== undefined) {
    const lasting = lastingReadings(files, readings, begun);
    if (!sameReadings(kept, lasting)) options.cache.write(root.value, lasting);
  }

  const { numbers, paths } = numberFiles(files, options.known ?? []);
  const images: IndexedImage[] = [];
  const leftOut: LeftOut[] = [...scan.value.leftOut];
  const stamps = new Array<FileStamp | undefined>(paths.length).fill(undefined);
  files.forEach((file, index) => {
    const fileId = numbers[index];
    const found = readings[index];
    if (fileId === undefined || found === undefined) throw new Error(`file not read: ${index}`);
    stamps[fileId] = found.stamp;
    if (found.reading.kind === 'image') {
      for (const image of found.reading.images) images.push({ fileId, file, image });
      for (const { code, text } of found.reading.leftOut ?? []) leftOut.push({ file, code, text });
    } else leftOut.push({ file, code: found.reading.code, text: found.reading.text });
  });
  const compared = await withPixelDigests(root.value, images, stamps, options.signal);
  if (isCancelled(options.signal)) return cancelled();
  const built = buildStacks(compared, basename(root.value));
  return success({
    root: root.value,
    files: seen,
    stacks: built.stacks,
    leftOut: [...leftOut, ...built.leftOut].sort(byFile),
    paths,
    stamps,
  });
}

/** The reading of each file, in the order of the files; undefined when the work was cancelled. */
async function readAll(
  root: string,
  files: readonly string[],
  kept: CachedReadings,
  options: IndexOptions,
): Promise<readonly FileReading[] | undefined> {
  const { onProgress, signal } = options;
  const unchanged = await unchangedFiles(root, files, kept, options);
  if (isCancelled(signal)) return undefined;
  const changed = files.filter((file) => !unchanged.has(file));
  const tell = (done: number): void =>
    onProgress?.({
      done,
      total: files.length,
      text: `Reading headers: ${done} of ${files.length}`,
    });
  if (changed.length === 0) tell(files.length);
  const read = await readBatches(
    changed.map((file) => join(root, file)),
    (done) => tell(unchanged.size + done),
    options,
  );
  if (read === undefined) return undefined;
  const share = createSharing();
  let next = 0;
  return files.map((file) => {
    const found = unchanged.has(file) ? kept.get(file) : read[next++];
    if (found === undefined) throw new Error(`file not read: ${file}`);
    return share(found);
  });
}

/** Headers by the batch, in the order of the paths; undefined when the work was cancelled. */
async function readBatches(
  paths: readonly string[],
  onDone: (done: number) => void,
  { signal, threads = usualThreads(), reader: given, characterSet }: IndexOptions,
): Promise<readonly FileReading[] | undefined> {
  const batches: (readonly string[])[] = [];
  for (let start = 0; start < paths.length; start += BATCH) {
    batches.push(paths.slice(start, start + BATCH));
  }
  const reader = given ?? createHeaderReader(Math.min(threads, batches.length));
  const found: (readonly FileReading[])[] = [];
  let done = 0;
  let next = 0;
  const lane = async (): Promise<void> => {
    for (let number = next++; number < batches.length; number = next++) {
      const batch = batches[number] ?? [];
      found[number] = await reader.read(batch, signal, { characterSet });
      done += batch.length;
      onDone(done);
    }
  };
  try {
    await Promise.all(Array.from({ length: reader.lanes }, lane));
    return found.flat();
  } catch (error) {
    if (isCancelled(signal)) return undefined;
    throw error;
  } finally {
    if (given === undefined) await reader.close();
  }
}

/** The readings that hold as long as their files stay as they are. */
function lastingReadings(
  files: readonly string[],
  readings: readonly FileReading[],
  begunMs: number,
): CachedReadings {
  const lasting = new Map<string, LastingReading>();
  readings.forEach(({ reading, stamp }, index) => {
    const file = files[index];
    if (file === undefined || stamp === undefined) return;
    const changedMs = Math.max(stamp.mtimeMs, stamp.ctimeMs);
    if (changedMs < begunMs - SETTLED_MS) lasting.set(file, { reading, stamp });
  });
  return lasting;
}

/** True when nothing was read anew and nothing is gone. */
function sameReadings(a: CachedReadings, b: CachedReadings): boolean {
  return (
    a.size === b.size && Array.from(b).every(([file, { stamp }]) => a.get(file)?.stamp === stamp)
  );
}

/** Numbers for files: those of an earlier index keep theirs, new ones come after. */
function numberFiles(
  files: readonly string[],
  known: readonly string[],
): { readonly numbers: readonly number[]; readonly paths: readonly string[] } {
  const paths = [...known];
  const numberOf = new Map(known.map((path, index) => [path, index]));
  const numbers = files.map((file) => {
    const before = numberOf.get(file);
    return before ?? paths.push(file) - 1;
  });
  return { numbers, paths };
}

function byFile(a: LeftOut, b: LeftOut): number {
  if (a.file !== b.file) return a.file < b.file ? -1 : 1;
  return a.code < b.code ? -1 : 1;
}
