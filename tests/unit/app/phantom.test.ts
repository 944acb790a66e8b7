import { mkdir, mkdtemp, readdir, readFile, rm, stat, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { build } from 'vite';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { ensureDemonstration } from '../../../app/host/phantom/ensureDemonstration.js';
import { makeDemonstration } from '../../../app/host/phantom/makeDemonstration.js';
import { workerFile } from '../../../app/host/workerFile.js';

let base: string;
let worker: string;
const choice = { seed: 2, slices: 2, matrix: 32 };

beforeAll(async () => {
  base = await mkdtemp(join(tmpdir(), 'diptych-demonstration-'));
  await build({
    configFile: false,
    logLevel: 'error',
    build: {
      ssr: true,
      outDir: join(base, 'built'),
      emptyOutDir: true,
      minify: false,
      rolldownOptions: {
        input: {
          worker: new URL('../../../app/host/phantom/phantom.worker.ts', import.meta.url).pathname,
        },
        output: { entryFileNames: '[name].mjs' },
      },
    },
  });
  worker = join(base, 'built', 'worker.mjs');
}, 60_000);

afterAll(() => rm(base, { recursive: true, force: true }));

const filesOf = async (folder: string): Promise<readonly string[]> =>
  (await readdir(folder, { recursive: true })).sort();

describe('makeDemonstration', () => {
  it('writes both kernels and the truth into an empty folder, and tells its progress', async () => {
    const texts: string[] = [];
    const first = join(base, 'first');
    await mkdir(first);
    const made = await makeDemonstration(first, {
      ...choice,
      worker,
      onProgress: ({ done, total }) => texts.push(`${done}/${total}`),
    });
    expect(made).toEqual({ ok: true, value: { files: 4, truthFile: join(first, 'truth.json') } });
    expect(texts).toEqual(['0/2', '1/2', '2/2']);
    const names = await filesOf(first);
    const slices = names.filter((name) => name.endsWith('.dcm'));
    expect(slices.map((name) => name.split('/')[0])).toEqual(['sharp', 'sharp', 'soft', 'soft']);
    const truth = JSON.parse(await readFile(join(first, 'truth.json'), 'utf8'));
    expect(truth).toMatchObject({
      stamp: { version: 1, seed: 2, slices: 2, matrix: 32 },
      slices: [{ zMm: 9.5 }, { zMm: 10 }],
    });
    expect(
      truth.slices.flatMap((one: { soft: string; sharp: string }) => [one.soft, one.sharp]).sort(),
    ).toEqual(slices);
  });

  it('refuses a folder that holds something, and leaves it as it was', async () => {
    const folder = join(base, 'full');
    await mkdir(folder);
    await writeFile(join(folder, 'mine.txt'), 'mine');
    const made = await makeDemonstration(folder, { ...choice, worker });
    expect(made).toMatchObject({ ok: false, refusal: { code: 'folder-not-empty' } });
    expect(await filesOf(folder)).toEqual(['mine.txt']);
  });

  it('refuses numbers of slices that the scene does not have', async () => {
    const made = await makeDemonstration(join(base, 'many'), { slices: 45, worker });
    expect(made).toMatchObject({ ok: false, refusal: { code: 'demonstration-slices' } });
  });

  it('leaves nothing behind when it is cancelled', async () => {
    const before = await readdir(base);
    const stop = new AbortController();
    const made = await makeDemonstration(join(base, 'cancelled'), {
      ...choice,
      slices: 4,
      worker,
      signal: stop.signal,
      onProgress: ({ done }) => {
        if (done === 1) stop.abort();
      },
    });
    expect(made).toMatchObject({ ok: false, refusal: { code: 'cancelled' } });
    expect(await readdir(base)).toEqual(before);
  });

  it('says in a sentence why nothing can be written', async () => {
    const file = join(base, 'file');
    await writeFile(file, '');
    const made = await makeDemonstration(join(file, 'below'), { ...choice, worker });
    expect(made).toMatchObject({ ok: false, refusal: { code: 'demonstration-not-written' } });
  });
});

describe('ensureDemonstration', () => {
  it('makes the study once and keeps it', async () => {
    const data = join(base, 'data');
    const folder = join(data, 'demonstration');
    const options = { ...choice, slices: 1, worker };
    const expected = {
      ok: true,
      value: { folder, files: 2, truthFile: join(folder, 'truth.json') },
    };
    expect(await ensureDemonstration(data, options)).toEqual(expected);
    const { ino } = await stat(folder);
    expect(await ensureDemonstration(data, options)).toEqual(expected);
    expect((await stat(folder)).ino).toBe(ino);
    expect(await readdir(data)).toEqual(['demonstration']);
  });

  it('makes it anew when a slice is missing or its stamp is of another version', async () => {
    const data = join(base, 'data');
    const folder = join(data, 'demonstration');
    const options = { ...choice, slices: 1, worker };
    const [slice] = await readdir(join(folder, 'soft'));
    await rm(join(folder, 'soft', slice ?? ''));
    expect((await ensureDemonstration(data, options)).ok).toBe(true);
    expect(await readdir(join(folder, 'soft'))).toEqual([slice]);

    const truthFile = join(folder, 'truth.json');
    const truth = JSON.parse(await readFile(truthFile, 'utf8'));
    await writeFile(truthFile, JSON.stringify({ ...truth, stamp: { ...truth.stamp, version: 0 } }));
    expect((await ensureDemonstration(data, options)).ok).toBe(true);
    expect(JSON.parse(await readFile(truthFile, 'utf8')).stamp.version).toBe(1);
    expect(await readdir(data)).toEqual(['demonstration']);
  });
});

describe('workerFile', () => {
  it('is a built file below the folder of the program’s package.json', () => {
    const root = new URL('../../..', import.meta.url).pathname;
    expect(workerFile('phantom.worker')).toBe(join(root, 'dist', 'app', 'phantom.worker.js'));
  });
});
