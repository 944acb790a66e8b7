import {
  chmod,
  mkdir,
  readdir,
  readFile,
  rename,
  rm,
  stat,
  truncate,
  utimes,
  writeFile,
} from 'node:fs/promises';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { createHeaderCache } from '../../../../../app/host/library/headerCache.js';
import { createHeaderReader } from '../../../../../app/host/library/headerReader.js';
import { type IndexedFolder, indexFolder } from '../../../../../app/host/library/indexFolder.js';
import { ctSlice } from '../../../../corpus/ctSlice.js';
import { hostForTest, studyFolder } from '../hostForTest.js';
import { temporaryFolder } from '../temporaryFolder.js';

/** Ten seconds on, when the files of a test have long been as they are. */
const later = (): number => Date.now() + 10_000;

const fail = (error: unknown): void => {
  throw error;
};

/** A study of three slices with a file that is none, and a cache beside it. */
async function setUp(reader = 'reader 1') {
  const home = await temporaryFolder();
  const folder = await studyFolder(home);
  await writeFile(join(folder, 'notes.txt'), 'no image');
  const cacheFolder = join(home, 'cache', 'headers');
  const cache = createHeaderCache({ folder: cacheFolder, reader, report: fail });
  return { folder, cacheFolder, cache };
}

type Cache = Awaited<ReturnType<typeof setUp>>['cache'];

/** Indexes a folder; says which files were opened for it. */
async function open(folder: string, cache: Cache, now: () => number = later) {
  const opened: string[] = [];
  const reader = createHeaderReader(0);
  const index = await indexFolder(folder, {
    cache,
    now,
    reader: {
      ...reader,
      read: (paths, signal) => {
        opened.push(...paths.map((path) => path.slice(folder.length + 1)));
        return reader.read(paths, signal);
      },
    },
  });
  if (!index.ok) throw new Error(index.refusal.text);
  await cache.settled();
  return { opened, index: index.value };
}

const filesOf = ({ stacks }: IndexedFolder): string[] =>
  stacks.flatMap(({ slices }) => slices.map(({ file }) => file));

async function onlyFile(folder: string): Promise<string> {
  const names = await readdir(folder);
  expect(names).toHaveLength(1);
  return join(folder, names[0] ?? '');
}

describe('A folder that was read before', () => {
  test('is not opened again, and has the very same index', async () => {
    const { folder, cache } = await setUp();
    const first = await open(folder, cache);
    expect(first.opened).toHaveLength(4);
    const second = await open(folder, cache);
    expect(second.opened).toEqual([]);
    expect(second.index).toEqual(first.index);
    expect(second.index.leftOut).toEqual([
      expect.objectContaining({ file: 'notes.txt', code: 'not-dicom' }),
    ]);
  });

  test('is read anew for what changed, and for that alone', async () => {
    const { folder, cache } = await setUp();
    await open(folder, cache);
    await writeFile(join(folder, 'slice2.dcm'), ctSlice({ number: 2, z: 1.25 }));
    await rm(join(folder, 'slice3.dcm'));
    await writeFile(join(folder, 'slice4.dcm'), ctSlice({ number: 4, z: 2 }));
    await mkdir(join(folder, 'moved'));
    await rename(join(folder, 'slice1.dcm'), join(folder, 'moved', 'slice1.dcm'));
    const { opened, index } = await open(folder, cache);
    expect(opened.sort()).toEqual(['moved/slice1.dcm', 'slice2.dcm', 'slice4.dcm']);
    expect(filesOf(index)).toEqual(['moved/slice1.dcm', 'slice2.dcm', 'slice4.dcm']);
    expect(index.stacks[0]?.slices.map(({ alongMm }) => alongMm)).toEqual([0.5, 1.25, 2]);
    expect((await open(folder, cache)).opened).toEqual([]);
  });

  test('is read anew where another file of the same size and time took a name', async () => {
    const { folder, cache } = await setUp();
    await open(folder, cache);
    const path = join(folder, 'slice2.dcm');
    const { size, mtime } = await stat(path);
    await writeFile(path, ctSlice({ number: 2, z: 2.0 }));
    await utimes(path, mtime, mtime);
    expect((await stat(path)).size).toBe(size);
    expect((await open(folder, cache)).opened).toEqual(['slice2.dcm']);
  });

  test('is read anew as long as its files changed a moment ago', async () => {
    const { folder, cache, cacheFolder } = await setUp();
    await open(folder, cache, Date.now);
    await expect(readdir(cacheFolder)).rejects.toThrow('ENOENT');
    expect((await open(folder, cache)).opened).toHaveLength(4);
    expect((await open(folder, cache)).opened).toEqual([]);
  });
});

describe('The cache of headers', () => {
  test.skipIf(process.platform === 'win32')('is for its owner alone', async () => {
    const { folder, cache, cacheFolder } = await setUp();
    await open(folder, cache);
    expect((await stat(cacheFolder)).mode & 0o777).toBe(0o700);
    expect((await stat(await onlyFile(cacheFolder))).mode & 0o777).toBe(0o600);
  });

  test.each([
    ['cut', (text: string) => text.slice(0, -20)],
    ['no JSON', () => 'no cache'],
    ['empty', () => ''],
    ['of another shape', (text: string) => text.replace('"rows":4', '"rows":"4"')],
    ['with more than it may hold', (text: string) => text.replace('"rows":4', '"rows":4,"x":1')],
    ['with a place in no table', (text: string) => text.replace('"identity":0', '"identity":7')],
    ['of another folder', (text: string) => text.replace(/"root":"[^"]*"/, '"root":"/elsewhere"')],
    ['of another format', (text: string) => text.replace(/"format":\d+/, '"format":0')],
  ])('is not believed when it is %s', async (_name, spoil) => {
    const { folder, cache, cacheFolder } = await setUp();
    await open(folder, cache);
    const path = await onlyFile(cacheFolder);
    const text = await readFile(path, 'utf8');
    expect(spoil(text)).not.toBe(text);
    await writeFile(path, spoil(text));
    const { opened, index } = await open(folder, cache);
    expect(opened).toHaveLength(4);
    expect(filesOf(index)).toEqual(['slice1.dcm', 'slice2.dcm', 'slice3.dcm']);
    expect(await readFile(path, 'utf8')).toBe(text);
  });

  test('is not believed when another reader wrote it', async () => {
    const { folder, cache, cacheFolder } = await setUp();
    await open(folder, cache);
    const other = createHeaderCache({ folder: cacheFolder, reader: 'reader 2', report: fail });
    expect((await open(folder, other)).opened).toHaveLength(4);
  });

  test('drops the folder that was used longest ago when all together are too large', async () => {
    const { folder, cache, cacheFolder } = await setUp();
    await open(folder, cache);
    const oldest = await onlyFile(cacheFolder);
    const { size } = await stat(oldest);
    await utimes(oldest, new Date(0), new Date(0));
    const limits = { one: 2 * size, all: Math.round(1.5 * size) };
    const small = createHeaderCache({ folder: cacheFolder, reader: 'r', report: fail, limits });
    const another = await studyFolder(await temporaryFolder());
    await open(another, small);
    expect(await onlyFile(cacheFolder)).not.toBe(oldest);
  });

  test('keeps nothing of a folder that is too large for it', async () => {
    const { folder, cacheFolder } = await setUp();
    const limits = { one: 100, all: 1000 };
    const cache = createHeaderCache({ folder: cacheFolder, reader: 'r', report: fail, limits });
    expect((await open(folder, cache)).index.stacks).toHaveLength(1);
    await expect(readdir(cacheFolder)).rejects.toThrow('ENOENT');
  });

  test('goes with the list of recent folders, and nothing else goes', async () => {
    const { home, ask, reported } = await hostForTest();
    const folder = join(home, 'cache', 'headers');
    await mkdir(folder, { recursive: true });
    await writeFile(join(folder, `${'0123456789abcdef'.repeat(2)}.json`), '{}');
    await writeFile(join(folder, `${'0123456789abcdef'.repeat(2)}.json.0123456789ab.tmp`), '{}');
    await writeFile(join(folder, 'somebody else’s'), 'text');
    expect((await ask('/api/recent', { method: 'DELETE' })).status).toBe(200);
    expect(await readdir(folder)).toEqual(['somebody else’s']);
    expect(reported).toEqual([]);
  });

  test('goes for one folder that is taken off the list of recent ones', async () => {
    const { home, services } = await hostForTest();
    const study = await studyFolder(home);
    await services.openFolder(study);
    const cacheFolder = join(home, 'cache', 'headers');
    const cache = createHeaderCache({ folder: cacheFolder, reader: 'r', report: fail });
    await open(study, cache);
    expect(await readdir(cacheFolder)).toHaveLength(1);
    const [recent] = await services.recents.list();
    await services.recents.remove(recent?.id ?? '');
    expect(await readdir(cacheFolder)).toEqual([]);
  });
});

describe('A cache of headers that meets trouble', () => {
  test('is read anew where a file was cut or two changed names', async () => {
    const { folder, cache } = await setUp();
    await open(folder, cache);
    const [one, two, three] = ['slice1.dcm', 'slice2.dcm', 'slice3.dcm'].map((name) =>
      join(folder, name),
    );
    if (one === undefined || two === undefined || three === undefined) throw new Error('no files');
    await rename(one, `${one}.aside`);
    await rename(two, one);
    await rename(`${one}.aside`, two);
    await truncate(three, (await stat(three)).size - 20);
    const { opened, index } = await open(folder, cache);
    expect(opened.sort()).toEqual(['slice1.dcm', 'slice2.dcm', 'slice3.dcm']);
    expect(index.stacks[0]?.slices.map(({ file, alongMm }) => [file, alongMm])).toEqual([
      ['slice2.dcm', 0.5],
      ['slice1.dcm', 1],
    ]);
    expect(index.leftOut.map(({ file }) => file)).toContain('slice3.dcm');
  });

  test.skipIf(process.getuid?.() === 0)(
    'says so once where it can’t be written, and the folder opens all the same',
    async () => {
      const { folder, cacheFolder } = await setUp();
      await mkdir(join(cacheFolder, '..'), { recursive: true });
      await chmod(join(cacheFolder, '..'), 0o500);
      await expectOpensUncached(folder, cacheFolder);
      await chmod(join(cacheFolder, '..'), 0o700);
    },
  );

  test('says so once where its folder is no folder, and the study opens all the same', async () => {
    const { folder, cacheFolder } = await setUp();
    await mkdir(join(cacheFolder, '..'), { recursive: true });
    await writeFile(cacheFolder, 'in the way');
    await expectOpensUncached(folder, cacheFolder);
    expect(await readFile(cacheFolder, 'utf8')).toBe('in the way');
  });

  test('serves two processes that open one folder at once', async () => {
    const { folder, cache, cacheFolder } = await setUp();
    const other = createHeaderCache({ folder: cacheFolder, reader: 'reader 1', report: fail });
    const both = await Promise.all([open(folder, cache), open(folder, other)]);
    expect(both[1].index).toEqual(both[0].index);
    await onlyFile(cacheFolder);
    expect((await open(folder, cache)).opened).toEqual([]);
    expect((await open(folder, other)).opened).toEqual([]);
    await cache.clear();
    expect((await open(folder, other)).opened).toHaveLength(4);
  });

  test('keeps nothing of a folder that was forgotten while it was being read', async () => {
    for (const forget of [(cache: Cache) => cache.clear(), forgetFolder]) {
      const { folder, cache, cacheFolder } = await setUp();
      const reader = createHeaderReader(0);
      const index = await indexFolder(folder, {
        cache,
        now: later,
        reader: {
          ...reader,
          read: async (paths, signal) => {
            await forget(cache, folder);
            return reader.read(paths, signal);
          },
        },
      });
      expect(index.ok).toBe(true);
      await cache.settled();
      expect(await readdir(cacheFolder).catch(() => [])).toEqual([]);
      await open(folder, cache);
      await onlyFile(cacheFolder);
    }
  });

  test('goes for a folder that falls off the end of the list of recent ones', async () => {
    const { home, services } = await hostForTest();
    const study = await studyFolder(home);
    await services.openFolder(study);
    const cacheFolder = join(home, 'cache', 'headers');
    await open(study, createHeaderCache({ folder: cacheFolder, reader: 'r', report: fail }));
    await onlyFile(cacheFolder);
    for (let number = 0; number < 10; number++) {
      const another = join(home, `other${number}`);
      await mkdir(another);
      await services.openFolder(another);
    }
    expect(await services.recents.list()).toHaveLength(10);
    expect(await readdir(cacheFolder)).toEqual([]);
  });

  test('lets the look for changes be cancelled', async () => {
    const { folder, cache } = await setUp();
    await open(folder, cache);
    const stop = new AbortController();
    const index = await indexFolder(folder, {
      threads: 0,
      signal: stop.signal,
      cache: {
        write: cache.write,
        read: async (root) => {
          stop.abort();
          return cache.read(root);
        },
      },
    });
    expect(index).toMatchObject({ ok: false, refusal: { code: 'cancelled' } });
  });
});

function forgetFolder(cache: Cache, folder: string): Promise<void> {
  return cache.forget(folder);
}

/** Opens a study twice with a cache that can't be written: both times all is read, and the fault is told. */
async function expectOpensUncached(folder: string, cacheFolder: string): Promise<void> {
  const told: unknown[] = [];
  const report = (error: unknown) => told.push(error);
  const cache = createHeaderCache({ folder: cacheFolder, reader: 'r', report });
  expect((await open(folder, cache)).opened).toHaveLength(4);
  expect(told).toHaveLength(1);
  const again = await open(folder, cache);
  expect(again.opened).toHaveLength(4);
  expect(again.index.stacks).toHaveLength(1);
}
