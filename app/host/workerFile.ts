import { createHash } from 'node:crypto';
import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { packageRoot } from './packageRoot.js';

/** The built file of a worker thread: dist/app/NAME.js below the program's package.json. */
export function workerFile(name: string): string {
  return join(packageRoot(), 'dist', 'app', `${name}.js`);
}

/**
 * Tells one build of a worker from another: the file names the chunks that it loads, and a chunk's name
 * changes with its content. Empty where nothing is built.
 */
export function workerFileHash(name: string): string {
  const path = workerFile(name);
  if (!existsSync(path)) return '';
  return createHash('sha256').update(readFileSync(path)).digest('hex').slice(0, 16);
}
