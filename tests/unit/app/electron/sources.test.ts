import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

const FOLDER = 'app/electron';
const sources = readdirSync(FOLDER)
  .filter((name) => name.endsWith('.ts'))
  .map((name) => ({ name, text: readFileSync(`${FOLDER}/${name}`, 'utf8') }));

/** What Electron's security guide forbids, by its item; each must be absent from the whole shell. */
const FORBIDDEN: readonly (readonly [item: string, pattern: RegExp])[] = [
  ['6, webSecurity off', /webSecurity:\s*false/],
  ['8, insecure content', /allowRunningInsecureContent/],
  ['9, experimental features', /experimentalFeatures/],
  ['10, Blink features', /enableBlinkFeatures/],
  ['15, openExternal', /openExternal\(/],
  ['18, file pages', /loadFile\(|file:\/\//],
  ['crash upload', /crashReporter/],
  ['remote code', /executeJavaScript\(|\beval\(|new Function\(/],
];

describe('app/electron', () => {
  it.each(FORBIDDEN)('has nothing of item %s', (_item, pattern) => {
    expect(sources.filter(({ text }) => pattern.test(text)).map(({ name }) => name)).toEqual([]);
  });

  it('never imports the parser of files: no unsandboxed process reads them (item 4)', () => {
    const parsing = sources.filter(({ text }) => /from '.*core\/dicom/.test(text));
    expect(parsing.map(({ name }) => name)).toEqual([]);
  });

  it('loads Electron in its two entries only; the rest is handed its parts', () => {
    const loading = sources.filter(({ text }) => /import (?!type)[^;]*from 'electron'/.test(text));
    expect(loading.map(({ name }) => name).sort()).toEqual(['main.ts', 'preload.ts']);
  });
});
