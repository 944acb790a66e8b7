import { mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, expect, test } from 'vitest';
import type { Progress } from '../../../../../app/host/contract.js';
import {
  createHeaderCache,
  type HeaderCache,
} from '../../../../../app/host/library/headerCache.js';
import { indexFolder } from '../../../../../app/host/library/indexFolder.js';
import { ctSlice } from '../../../../corpus/ctSlice.js';

const FILES = 20_000;

/** Copies of one small slice, each with an instance UID and a place of its own, in sub-folders of 1,000. */
function writeMany(folder: string): void {
  const number = 10_000_000;
  const z = 10_000.25;
  const bytes = Buffer.from(ctSlice({ number, z }));
  const uidAt = bytes.indexOf(`.${number}`) + 1;
  const metaUidAt = bytes.indexOf(`.${number}`, uidAt) + 1;
  const zAt = bytes.indexOf(String(z));
  expect(Math.min(uidAt, metaUidAt, zAt)).toBeGreaterThan(132);
  for (let file = 0; file < FILES; file++) {
    bytes.write(String(number + file), uidAt, 'latin1');
    bytes.write(String(number + file), metaUidAt, 'latin1');
    bytes.write((z + file * 0.5).toFixed(2), zAt, 'latin1');
    const sub = join(folder, String(Math.floor(file / 1000)));
    if (file % 1000 === 0) mkdirSync(sub);
    writeFileSync(join(sub, `${file}`), bytes);
  }
}

/** Open files of this process, where the system tells (proc(5)). */
function openFiles(): number {
  return process.platform === 'linux' ? readdirSync('/proc/self/fd').length : 0;
}

let home: string;
let folder: string;
let cache: HeaderCache;

beforeAll(() => {
  home = mkdtempSync(join(tmpdir(), 'diptych-test-'));
  folder = join(home, 'study');
  mkdirSync(folder);
  writeMany(folder);
  cache = createHeaderCache({
    folder: join(home, 'headers'),
    reader: 'r',
    report: (error) => {
      throw error;
    },
  });
}, 60_000);

afterAll(async () => {
  await cache.settled();
  rmSync(home, { recursive: true });
}, 60_000);

/** Ten seconds on, when the files of a test have long been as they are. */
const now = (): number => Date.now() + 10_000;

test('a folder of 20,000 files is read without a stall, with few files open and in little memory', async () => {
  const openBefore = openFiles();
  const heapBefore = process.memoryUsage().heapUsed;
  let openMost = 0;
  let longestWait = 0;
  let last = performance.now();
  const told: Progress[] = [];
  const begun = performance.now();
  const tick = setInterval(() => {
    const now = performance.now();
    longestWait = Math.max(longestWait, now - last);
    last = now;
    openMost = Math.max(openMost, openFiles());
  }, 5);
  const index = await indexFolder(folder, {
    threads: 0,
    cache,
    now,
    onProgress: (progress) => told.push(progress),
  });
  const seconds = (performance.now() - begun) / 1000;
  // The last stall ends with the reading; the next tick sees it.
  await new Promise((resolve) => setTimeout(resolve, 20));
  clearInterval(tick);
  if (!index.ok) throw new Error(index.refusal.text);
  expect(index.value.files).toBe(FILES);
  expect(index.value.stacks).toHaveLength(1);
  expect(index.value.stacks[0]?.slices).toHaveLength(FILES);
  expect(index.value.stacks[0]?.sliceSpacingMm).toBe(0.5);
  expect(told.at(-1)).toMatchObject({ done: FILES, total: FILES });
  expect(told.length).toBeGreaterThan(100);
  expect(openMost - openBefore).toBeLessThan(20);
  // What slices have in common is kept once: about a kilobyte is left of each.
  expect((process.memoryUsage().heapUsed - heapBefore) / FILES).toBeLessThan(10_000);
  // Bounds for a busy machine of two processors; a quiet one takes three seconds.
  expect(longestWait).toBeLessThan(2000);
  expect(seconds).toBeLessThan(30);
}, 120_000);

test('that folder opens again from the cache without a stall and with its progress told', async () => {
  // The test before has read it.
  await cache.settled();
  let longestWait = 0;
  let last = performance.now();
  const told: Progress[] = [];
  const begun = performance.now();
  const tick = setInterval(() => {
    const present = performance.now();
    longestWait = Math.max(longestWait, present - last);
    last = present;
  }, 5);
  const second = await indexFolder(folder, {
    cache,
    now,
    onProgress: (progress) => told.push(progress),
    reader: {
      lanes: 1,
      read: async (paths) => {
        throw new Error(`opened: ${paths.length} files`);
      },
      warm: async () => {},
      close: async () => {},
    },
  });
  const seconds = (performance.now() - begun) / 1000;
  await new Promise((resolve) => setTimeout(resolve, 20));
  clearInterval(tick);
  if (!second.ok) throw new Error(second.refusal.text);
  expect(second.value.stacks[0]?.slices).toHaveLength(FILES);
  expect(second.value.stacks[0]?.slices[7]?.alongMm).toBe(10_003.75);
  expect(told.filter(({ text }) => text.startsWith('Looking for changes')).length).toBe(40);
  expect(told.at(-1)).toMatchObject({ done: FILES, total: FILES });
  // Bounds for a busy machine of two processors; a quiet one takes a second.
  expect(longestWait).toBeLessThan(3000);
  expect(seconds).toBeLessThan(20);
}, 120_000);
