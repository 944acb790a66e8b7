import { type Result, refuse, success } from '../../../core/result.js';
import type { FolderIndex } from '../../../core/stack/index.js';
import type { Grants } from '../folders/grants.js';
import type { JobOptions } from '../services.js';
import { createHeaderReader, type HeaderReader, usualThreads } from './headerReader.js';
import { type IndexedFolder, indexFolder } from './indexFolder.js';
import { type OpenFrame, openFrame } from './openFrame.js';

/** What the opened folders hold. */
export interface Library {
  /** Reads a granted folder anew. Its files can be asked for from then on; numbers given before stay. */
  index(grant: string, options?: JobOptions): Promise<Result<FolderIndex>>;
  /** Opens a file by its number in the folder's index. Whoever gets it closes it. */
  open(grant: string, fileId: number): Promise<Result<OpenFrame>>;
}

/** A library over the granted folders. Its threads begin with the first index and end themselves when idle. */
export function createLibrary(grants: Grants, threads = usualThreads()): Library {
  let kept: HeaderReader | undefined;
  const reader = (): HeaderReader => {
    kept ??= createHeaderReader(threads);
    return kept;
  };
  const indexes = new Map<string, Pick<IndexedFolder, 'root' | 'paths' | 'stamps'>>();
  return {
    async index(grant, options = {}) {
      const folder = grants.find(grant);
      if (folder === undefined) return refuse('no-such-folder', NOT_OPEN);
      const known = indexes.get(grant)?.paths ?? [];
      const found = await indexFolder(folder.root, {
        ...options,
        known,
        reader: reader(),
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
