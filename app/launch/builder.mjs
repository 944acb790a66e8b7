// Builds dist/ when the sources have changed since the last build. Two starts at once wait for each other.
import { createHash } from 'node:crypto';
import {
  existsSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  rmSync,
  statSync,
  writeFileSync,
} from 'node:fs';
import { join } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { ROOT, runPackage, say } from './project.mjs';

const SOURCES = ['core', 'app', 'renderer', 'assets', 'package.json', 'package-lock.json'];
const STAMP = join(ROOT, 'dist', '.built');
const LOCK = join(ROOT, 'node_modules', '.diptych-building');
const CONFIGS = [
  'app/vite.config.ts',
  'app/electron/vite.preload.config.ts',
  'renderer/vite.config.ts',
];

/** Resolves to false when a build failed; what it printed says why. */
export async function ensureBuilt() {
  await holdLock();
  try {
    const wanted = sourcesHash();
    if (existsSync(STAMP) && readFileSync(STAMP, 'utf8') === wanted) return true;
    rmSync(STAMP, { force: true });
    say('Building …');
    for (const config of CONFIGS) {
      const code = await runPackage('vite/bin/vite.js', [
        'build',
        '--config',
        config,
        '--logLevel',
        'warn',
      ]);
      if (code !== 0) {
        say(`The build failed in ${config}.`);
        return false;
      }
    }
    writeFileSync(STAMP, wanted);
    return true;
  } finally {
    rmSync(LOCK, { recursive: true, force: true });
  }
}

function sourcesHash() {
  const hash = createHash('sha256');
  const walk = (path) => {
    const full = join(ROOT, path);
    if (!existsSync(full)) return;
    if (statSync(full).isDirectory()) {
      for (const name of readdirSync(full).sort()) walk(`${path}/${name}`);
    } else {
      hash.update(path).update('\0').update(readFileSync(full)).update('\0');
    }
  };
  for (const source of SOURCES) walk(source);
  return hash.digest('hex');
}

/** A folder is made by one process only; one that is older than five minutes was left behind. */
async function holdLock() {
  for (;;) {
    try {
      mkdirSync(LOCK);
      return;
    } catch (error) {
      if (error.code !== 'EEXIST') throw error;
    }
    const age = Date.now() - (statSync(LOCK, { throwIfNoEntry: false })?.mtimeMs ?? Date.now());
    if (age > 5 * 60_000) rmSync(LOCK, { recursive: true, force: true });
    await pause(200);
  }
}
