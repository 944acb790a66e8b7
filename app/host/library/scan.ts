import type { Dirent } from 'node:fs';
import { lstat, readdir, realpath } from 'node:fs/promises';
import { join } from 'node:path';
import { type Result, refuse, success } from '../../../core/result.js';
import type { LeftOut } from '../../../core/stack/index.js';
import { isContained } from '../folders/contained.js';
import type { JobOptions } from '../services.js';
import { fileErrorCode, fileErrorReason } from '../storage/fileError.js';
import { cancelled, isCancelled } from './cancelled.js';

/** Folders in folders are followed down to this depth. */
export const DEEPEST = 32;

/** Progress is told after so many more files. */
const TELL_EACH = 500;

/** What a walk through a folder found. */
export interface Scan {
  /** Ordinary files: paths relative to the folder, '/' between names, folder by folder in the order of their names. */
  readonly files: readonly string[];
  readonly leftOut: readonly LeftOut[];
  /** Ordinary files and everything else that is no folder. */
  readonly seen: number;
}

/**
 * Walks through a folder, given by its real path, without opening a file. Links are not followed: one
 * that leads to a place in the folder would show the same file twice, one that leads out of it would
 * read what was not opened; each is left out with its reason. A folder that is met a second time (a
 * mount inside itself) is not entered again. One folder is open at a time, whatever the size of the tree.
 */
export async function scanFolder(root: string, options: JobOptions = {}): Promise<Result<Scan>> {
  const files: string[] = [];
  const leftOut: LeftOut[] = [];
  const visited = new Set<string>();
  let seen = 0;
  let told = 0;
  const leave = (file: string, code: string, text: string): void => {
    leftOut.push({ file, code, text });
  };

  /** Folders still to be entered; the next one is the last. */
  const waiting: { readonly folder: string; readonly depth: number }[] = [{ folder: '', depth: 0 }];
  for (let next = waiting.pop(); next !== undefined; next = waiting.pop()) {
    if (isCancelled(options.signal)) return cancelled();
    const { folder, depth } = next;
    const listed = await listFolder(join(root, folder), visited);
    if (!listed.ok) {
      if (folder === '') return listed;
      leave(`${folder}/`, listed.refusal.code, listed.refusal.text);
      continue;
    }
    const folders: string[] = [];
    for (const entry of listed.value) {
      const file = folder === '' ? entry.name : `${folder}/${entry.name}`;
      if (entry.isDirectory()) {
        if (depth < DEEPEST) folders.push(file);
        else leave(`${file}/`, 'too-deep', `More than ${DEEPEST} folders deep: not looked into.`);
        continue;
      }
      seen += 1;
      if (entry.isFile()) files.push(file);
      else if (entry.isSymbolicLink()) leave(file, ...(await aboutLink(root, join(root, file))));
      else leave(file, 'special-file', 'Not an ordinary file: a device, a socket or a pipe.');
    }
    for (const inner of folders.reverse()) waiting.push({ folder: inner, depth: depth + 1 });
    if (seen - told >= TELL_EACH) {
      told = seen;
      options.onProgress?.({ done: seen, text: `Looking through the folder: ${seen} files` });
    }
  }
  return success({ files, leftOut, seen });
}

/** A folder's entries, ordered by name so that every reading of a folder numbers its files alike. */
async function listFolder(path: string, visited: Set<string>): Promise<Result<Dirent[]>> {
  try {
    const { dev, ino } = await lstat(path, { bigint: true });
    const identity = `${dev}:${ino}`;
    if (visited.has(identity)) {
      return refuse('folder-repeats', 'The same folder as one above: not looked into again.');
    }
    visited.add(identity);
    const entries = await readdir(path, { withFileTypes: true });
    return success(entries.sort((a, b) => (a.name < b.name ? -1 : 1)));
  } catch (error) {
    const reason = fileErrorReason(error);
    if (reason === undefined) throw error;
    return refuse('unreadable-folder', `The folder can’t be read: ${reason}.`);
  }
}

async function aboutLink(root: string, path: string): Promise<readonly [string, string]> {
  try {
    const target = await realpath(path);
    return target === root || isContained(root, target)
      ? ['link', 'A link to a place in the same folder, which is read there.']
      : [
          'link-outside',
          'A link that leads out of the opened folder: open the folder it leads to.',
        ];
  } catch (error) {
    const code = fileErrorCode(error);
    if (code === undefined) throw error;
    if (code === 'ELOOP') return ['link-loop', 'A link that leads in a circle.'];
    return ['dangling-link', 'A link to something that is not there.'];
  }
}
