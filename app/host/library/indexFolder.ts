import { join } from 'node:path';
import { type Result, success } from '../../../core/result.js';
import {
  buildStacks,
  type FolderIndex,
  type IndexedImage,
  type LeftOut,
} from '../../../core/stack/index.js';
import { realFolder } from '../folders/grants.js';
import type { JobOptions } from '../services.js';
import { cancelled, isCancelled } from './cancelled.js';
import { createHeaderReader, type HeaderReader, usualThreads } from './headerReader.js';
import type { FileReading, FileStamp } from './readFileHeader.js';
import { scanFolder } from './scan.js';

const BATCH = 32;

/** How a folder is indexed. */
export interface IndexOptions extends JobOptions {
  /** Worker threads; 0 reads in this thread. By default one less than there are processors, four at most. */
  readonly threads?: number;
  /** A reader to be used instead of threads of its own. It is not closed here. */
  readonly reader?: HeaderReader;
  /** Paths of an earlier index of this folder: a file that is still there keeps its number. */
  readonly known?: readonly string[];
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
  options: IndexOptions = {},
): Promise<Result<IndexedFolder>> {
  const root = await realFolder(directory);
  if (!root.ok) return root;
  const scan = await scanFolder(root.value, options);
  if (!scan.ok) return scan;
  const { files, seen } = scan.value;

  const readings = await readAll(root.value, files, options);
  if (readings === undefined) return cancelled();

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
    } else leftOut.push({ file, code: found.reading.code, text: found.reading.text });
  });
  const built = buildStacks(images);
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
  { onProgress, signal, threads = usualThreads(), reader: given }: IndexOptions,
): Promise<readonly FileReading[] | undefined> {
  if (isCancelled(signal)) return undefined;
  const batches: string[][] = [];
  for (let start = 0; start < files.length; start += BATCH) {
    batches.push(files.slice(start, start + BATCH).map((file) => join(root, file)));
  }
  const reader = given ?? createHeaderReader(Math.min(threads, batches.length));
  let done = 0;
  try {
    const readings = await Promise.all(
      batches.map(async (batch) => {
        const read = await reader.read(batch, signal);
        done += batch.length;
        const text = `Reading headers: ${done} of ${files.length}`;
        onProgress?.({ done, total: files.length, text });
        return read;
      }),
    );
    return readings.flat();
  } catch (error) {
    if (isCancelled(signal)) return undefined;
    throw error;
  } finally {
    if (given === undefined) await reader.close();
  }
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
