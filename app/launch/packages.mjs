// Installs the packages of package-lock.json when they are missing or not those of the lock.
import { createHash } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { ROOT, run, say } from './project.mjs';

const STAMP = join(ROOT, 'node_modules', '.diptych-packages');

export async function ensurePackages() {
  const wanted = createHash('sha256')
    .update(readFileSync(join(ROOT, 'package-lock.json')))
    .digest('hex');
  if (existsSync(STAMP) && readFileSync(STAMP, 'utf8') === wanted) return;
  say('Installing packages …');
  const npm = process.platform === 'win32' ? 'npm.cmd' : 'npm';
  const code = await run(npm, ['ci', '--no-audit', '--no-fund', '--loglevel=error'], {
    shell: process.platform === 'win32',
  });
  if (code !== 0) {
    say('The packages could not be installed: run "npm ci" and read what it says.');
    process.exit(2);
  }
  writeFileSync(STAMP, wanted);
}
