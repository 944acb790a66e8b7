import type { ReadOptions } from '../../../core/dicom/index.js';
import { type Result, refuse, success } from '../../../core/result.js';
import type { FolderIndex } from '../../../core/stack/index.js';
import type { Grants } from '../folders/grants.js';
import type { JobOptions } from '../services.js';
import type { HeaderCache } from './headerCache.js';
import { createHeaderReader, type HeaderReader, usualThreads } from './headerReader.js';
import { type IndexedFolder, indexFolder } from './indexFolder.js';
import { type OpenFrame, openFrame } from './openFrame.js';

/** What the opened folders hold. */
export interface Library {
  /** Says that a folder is about to be read: the threads start while the page is still loading. */
  warm(): Promise<void>;
  /** Reads a granted folder anew. Its files can be asked for from then on; numbers given before stay. */
  index(grant: string, options?: JobOptions & ReadOptions): Promise<Result<FolderIndex>>;
  /** Opens a file by its number in the folder's index. Whoever gets it closes it. */
  open(grant: string, fileId: number): Promise<Result<OpenFrame>>;
}

/** How a library reads: its worker threads, 0 for none, and what it keeps of folders that it has read. */
export interface LibraryOptions {
  readonly threads?: number | undefined;
  readonly cache?: Pick<HeaderCache, 'read' | 'write'>;
}

/** A library over the granted folders. Its threads begin when they are needed first and end themselves when idle. */
export function createLibrary(
  grants: Grants,
  { threads = usualThreads(), cache }: LibraryOptions = {},
): Library {
  let kept: HeaderReader | undefined;
  const reader = (): HeaderReader => {
    kept ??= createHeaderReader(threads);
    return kept;
  };
  const indexes = new Map<string, Pick<IndexedFolder, 'root' | 'paths' | 'stamps'>>();
  return {
    warm: () => reader().warm(),
    async index(grant, options = {}) {
      const folder = grants.find(grant);
      if (folder === undefined) return refuse('no-such-folder', NOT_OPEN);
      const known = indexes.get(grant)?.paths ?? [];
      const found = await indexFolder(folder.root, {
        ...options,
        known,
        reader: reader(),
        ...(cache !== undefined && { cache }),
      });
      if (!found.ok) return found;
      const { root, paths, stamps, ...index } = found.value;
      indexes.set(grant, { root, paths, stamps });
      return success(index);
    },
    async open(grant, fileId) {
      const index = indexes.get(grant);
      const path = index?.paths[fileId];
      if (grants.find(grant) === undefined) return refuse('no-such-folder', NOT_OPEN);
      const stamp = index?.stamps[fileId];
      if (index === undefined || path === undefined || stamp === undefined) {
        return refuse(
          'no-such-file',
          'There is no such file in this folder. Open the folder again.',
        );
      }
      return openFrame(index.root, path, stamp);
    },
  };
}

const NOT_OPEN = 'This folder is not open. Open it again.';
