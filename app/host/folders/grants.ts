import { randomBytes } from 'node:crypto';
import { realpath, stat } from 'node:fs/promises';
import { basename } from 'node:path';
import { type Result, refuse, success } from '../../../core/result.js';
import type { OpenFolder } from '../contract.js';
import { fileErrorReason } from '../storage/fileError.js';

/** A folder that was opened: what the page knows of it, and where it really lies. */
export interface GrantedFolder extends OpenFolder {
  /** Real path, without links. Never leaves the host. */
  readonly root: string;
}

/** The folders that were opened since start. Only what is listed here can be read. */
export interface Grants {
  /**
   * Opens a folder: follows links to its real place and gives it a grant. A folder that is open
   * keeps its grant and becomes the latest.
   */
  open(path: string): Promise<Result<OpenFolder>>;
  find(grant: string): GrantedFolder | undefined;
  /** In the order of opening. */
  list(): readonly OpenFolder[];
}

/** An empty list of opened folders. */
export function createGrants(): Grants {
  const byGrant = new Map<string, GrantedFolder>();

  return {
    async open(path) {
      const root = await realFolder(path);
      if (!root.ok) return root;
      const before = [...byGrant.values()].find((folder) => folder.root === root.value);
      const folder = before ?? {
        grant: randomBytes(16).toString('base64url'),
        name: folderName(root.value),
        root: root.value,
      };
      byGrant.delete(folder.grant);
      byGrant.set(folder.grant, folder);
      return success({ grant: folder.grant, name: folder.name });
    },
    find: (grant) => byGrant.get(grant),
    list: () => [...byGrant.values()].map(({ grant, name }) => ({ grant, name })),
  };
}

/** Last part of a path, or the whole of it for a root such as '/' or 'D:\'. */
export function folderName(path: string): string {
  return basename(path) || path;
}

/** The real path of a folder, or why it can't be opened. */
export async function realFolder(path: string): Promise<Result<string>> {
  try {
    const root = await realpath(path);
    if (!(await stat(root)).isDirectory()) {
      return refuse(
        'not-a-folder',
        `${folderName(path)} is a file. Open the folder that holds it.`,
      );
    }
    return success(root);
  } catch (error) {
    const reason = fileErrorReason(error);
    if (reason === undefined) throw error;
    return refuse('folder-not-opened', `${folderName(path)} can’t be opened: ${reason}.`);
  }
}
