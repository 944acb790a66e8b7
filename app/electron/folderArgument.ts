import { resolve } from 'node:path';

/**
 * Folders named on a command line, as absolute paths.
 *
 * @param argv the process's arguments, with the program first
 * @param isPackaged false when Electron was started with the app as its first argument
 * @param cwd the folder against which relative names are resolved: the starting process's own
 *
 * Switches (Chromium adds its own, anywhere) are passed over; after '--' everything is a folder.
 */
export function folderArguments(
  argv: readonly string[],
  isPackaged: boolean,
  cwd: string,
): readonly string[] {
  const given = argv.slice(1);
  const end = given.indexOf('--');
  const before = (end === -1 ? given : given.slice(0, end)).filter((word) => !word.startsWith('-'));
  const after = end === -1 ? [] : given.slice(end + 1);
  return [...(isPackaged ? before : before.slice(1)), ...after]
    .filter((word) => word !== '')
    .map((word) => resolve(cwd, word));
}
