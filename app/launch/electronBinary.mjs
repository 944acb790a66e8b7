// Where the Electron binary is, without loading the package: loading it would start a download.
import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { ROOT, runPackage } from './project.mjs';

const PACKAGE = join(ROOT, 'node_modules', 'electron');

/** Path of the binary, or undefined when it is not there. */
export function electronBinary() {
  const pointer = join(PACKAGE, 'path.txt');
  if (!existsSync(pointer)) return undefined;
  const binary = join(PACKAGE, 'dist', readFileSync(pointer, 'utf8').trim());
  return existsSync(binary) ? binary : undefined;
}

/** Tries once to fetch the binary, for a minute at most. */
export async function fetchElectronBinary() {
  if (!existsSync(join(PACKAGE, 'install.js'))) return undefined;
  await runPackage('electron/install.js', [], { stdio: 'ignore', timeout: 60_000 });
  return electronBinary();
}
