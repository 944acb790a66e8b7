import { isAbsolute, relative, sep } from 'node:path';

/** True when a real path lies in a real folder, at any depth. A folder does not contain itself. */
export function isContained(root: string, path: string): boolean {
  const way = relative(root, path);
  return way !== '' && way !== '..' && !way.startsWith(`..${sep}`) && !isAbsolute(way);
}
