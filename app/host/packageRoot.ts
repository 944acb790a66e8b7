import { existsSync } from 'node:fs';
import { dirname, join } from 'node:path';

/** Folder of the program's package.json: above the sources, above dist and in the packed application alike. */
export function packageRoot(): string {
  let folder = import.meta.dirname;
  while (!existsSync(join(folder, 'package.json'))) {
    const parent = dirname(folder);
    if (parent === folder) throw new Error(`no package.json above: ${import.meta.dirname}`);
    folder = parent;
  }
  return folder;
}
