import { join } from 'node:path';
import { packageRoot } from './packageRoot.js';

/** The built file of a worker thread: dist/app/NAME.js below the program's package.json. */
export function workerFile(name: string): string {
  return join(packageRoot(), 'dist', 'app', `${name}.js`);
}
