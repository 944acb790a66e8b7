import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join, relative, resolve } from 'node:path';
import { describe, expect, it } from 'vitest';

const ROOT = resolve(import.meta.dirname, '../../..');

interface Import {
  readonly file: string;
  readonly target: string;
  readonly typeOnly: boolean;
}

function sources(folder: string): string[] {
  return readdirSync(join(ROOT, folder), { recursive: true, encoding: 'utf8' })
    .filter((name) => /\.tsx?$/.test(name) && !name.endsWith('.d.ts'))
    .map((name) => join(folder, name));
}

/** Imports of a file; a relative one as its path from the root. */
function importsOf(file: string, text = readFileSync(join(ROOT, file), 'utf8')): Import[] {
  const statement =
    /^\s*(?:import|export)\s+(type\s)?[^'";]*?from\s+'([^']+)'|^\s*import\s+'([^']+)'|import\(\s*'([^']+)'\s*\)/gm;
  return [...text.matchAll(statement)].map((match) => {
    const target = match[2] ?? match[3] ?? match[4] ?? '';
    return {
      file,
      target: target.startsWith('.')
        ? relative(ROOT, resolve(ROOT, dirname(file), target))
        : target,
      typeOnly: match[1] !== undefined,
    };
  });
}

/** What is wrong with an import, or undefined. The arrows: renderer → core ← app. */
function offence({ file, target, typeOnly }: Import): string | undefined {
  const from = file.split('/')[0];
  const to = target.split('/')[0];
  const forbidden: readonly [boolean, string][] = [
    [
      from === 'core' && ['app', 'renderer', 'tests'].includes(to ?? ''),
      'core imports nothing but core',
    ],
    [
      from === 'core' && /^(node:|electron$|cornerstone-core$|preact|hono)/.test(target),
      'core has no host',
    ],
    [from === 'app' && ['renderer', 'tests'].includes(to ?? ''), 'app never imports the page'],
    [from === 'renderer' && to === 'tests', 'the page never imports tests'],
    [
      from === 'renderer' && to === 'app' && !(typeOnly && target.startsWith('app/host/')),
      'the page takes only types, and only of the host',
    ],
    [
      target === 'electron' && !file.startsWith('app/electron/'),
      'only app/electron imports electron',
    ],
    [
      target === 'cornerstone-core' && file !== 'renderer/plates/cornerstoneViewport.ts',
      'one adapter alone imports cornerstone-core',
    ],
    [
      file.startsWith('app/electron/') && target.startsWith('core/dicom'),
      'the main process parses no image',
    ],
  ];
  return forbidden.find(([holds]) => holds)?.[1];
}

describe('the arrows of the house', () => {
  it('run from renderer and app to core, and never back', () => {
    const offences = ['core', 'app', 'renderer']
      .flatMap(sources)
      .filter((file) => !file.endsWith('vite.config.ts') && !file.includes('vite.preload'))
      .flatMap((file) => importsOf(file))
      .map((one) => ({ ...one, offence: offence(one) }))
      .filter((one) => one.offence !== undefined);
    expect(offences).toEqual([]);
  });

  it.each([
    ['core/region/x.ts', "import { readFile } from 'node:fs';"],
    ['core/region/x.ts', "import { host } from '../../app/host/handler.js';"],
    ['renderer/x.ts', "import { createHandler } from '../app/host/handler.js';"],
    ['renderer/x.ts', "import type { Cli } from '../app/cli/main.js';"],
    ['renderer/state/x.ts', "import * as cornerstone from 'cornerstone-core';"],
    ['app/host/x.ts', "import { app } from 'electron';"],
    ['app/host/x.ts', "export { frame } from '../../renderer/main.js';"],
    ['app/electron/x.ts', "import { decodeImage } from '../../core/dicom/index.js';"],
  ])('break the build from %s with %s', (file, text) => {
    expect(importsOf(file, text).map(offence)).toEqual([expect.any(String)]);
  });
});
