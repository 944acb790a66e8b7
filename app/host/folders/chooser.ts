import { randomBytes } from 'node:crypto';
import { readdir, realpath, stat } from 'node:fs/promises';
import { homedir } from 'node:os';
import { dirname, join } from 'node:path';
import type { FolderLevel } from '../contract.js';
import { fileErrorCode, fileErrorReason } from '../storage/fileError.js';
import { folderName, realFolder } from './grants.js';
import { startingPlaces } from './startingPlaces.js';

/** The folder chooser of a shell without a system dialog: folder names only, never the name of a file. */
export interface FolderChooser {
  /** One level; the home folder without an id. Undefined for an id that was not handed out. */
  level(id?: string): Promise<FolderLevel | undefined>;
  /** The real path behind an id that this chooser has handed out. */
  find(id: string): string | undefined;
}

/** A chooser that starts at the given folder. Its ids mean nothing outside this process. */
export function createChooser(home: string = homedir()): FolderChooser {
  const idByPath = new Map<string, string>();
  const pathById = new Map<string, string>();

  const named = (path: string, name = folderName(path)): { id: string; name: string } => {
    const id = idByPath.get(path) ?? randomBytes(12).toString('base64url');
    idByPath.set(path, id);
    pathById.set(id, path);
    return { id, name };
  };

  return {
    find: (id) => pathById.get(id),
    async level(id) {
      const path = id === undefined ? home : pathById.get(id);
      if (path === undefined) return undefined;
      const roots = (await startingPlaces(home)).map((place) => named(place.path, place.name));
      const real = await realFolder(path);
      if (!real.ok) {
        const trail = trailOf(path).map((step) => named(step));
        return { ...named(path), trail, roots, children: [], refusal: real.refusal.text };
      }
      const here = {
        ...named(real.value),
        trail: trailOf(real.value).map((step) => named(step)),
        roots,
      };
      try {
        const children = await childFolders(real.value);
        return { ...here, children: children.map((child) => named(child.path, child.name)) };
      } catch (error) {
        const reason = fileErrorReason(error);
        if (reason === undefined) throw error;
        return { ...here, children: [], refusal: `${here.name} can’t be listed: ${reason}.` };
      }
    },
  };
}

/** From the root down to the folder itself. */
function trailOf(path: string): readonly string[] {
  const parent = dirname(path);
  return parent === path ? [path] : [...trailOf(parent), path];
}

/** Folders in a folder, hidden ones left out, in the order that people expect of names with numbers. */
async function childFolders(
  path: string,
): Promise<readonly { readonly path: string; readonly name: string }[]> {
  const entries = await readdir(path, { withFileTypes: true });
  const children: { path: string; name: string }[] = [];
  for (const entry of entries) {
    if (entry.name.startsWith('.')) continue;
    const child = join(path, entry.name);
    if (entry.isDirectory()) children.push({ path: child, name: entry.name });
    else if (entry.isSymbolicLink()) {
      const target = await linkedFolder(child);
      if (target !== undefined) children.push({ path: target, name: entry.name });
    }
  }
  const order = new Intl.Collator('en', { numeric: true, sensitivity: 'base' });
  return children.sort((a, b) => order.compare(a.name, b.name));
}

/** The real folder that a link leads to; undefined when it leads nowhere or to a file. */
async function linkedFolder(path: string): Promise<string | undefined> {
  try {
    const target = await realpath(path);
    return (await stat(target)).isDirectory() ? target : undefined;
  } catch (error) {
    if (fileErrorCode(error) === undefined) throw error;
    return undefined;
  }
}
