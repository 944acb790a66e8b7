import { mkdir, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { describe, expect, it, vi } from 'vitest';
import { DEEPEST, scanFolder } from '../../../app/host/library/scan.js';
import { readHeader } from '../../../core/dicom/index.js';
import { ctSlice } from '../../corpus/ctSlice.js';
import { plainRead } from '../../corpus/plainSlice.js';
import { CLOSED, DENIED, VANISHING } from '../../corpus/rows/folder.js';
import { ROWS } from '../../corpus/rows/index.js';
import { temporaryFolder } from '../app/host/temporaryFolder.js';
import { checkCase } from './checkCase.js';

function failure(code: string): Error {
  return Object.assign(new Error(code), { code, syscall: 'test' });
}

// Whoever runs the tests may be allowed everything: so the test plays the system of row 13.
vi.mock('node:fs', async (original) => {
  const fs = await original<typeof import('node:fs')>();
  const openSync: typeof fs.openSync = (path, ...rest) => {
    if (String(path).endsWith(DENIED)) throw failure('EACCES');
    if (String(path).endsWith(VANISHING)) throw failure('ENOENT');
    return fs.openSync(path, ...rest);
  };
  return { ...fs, openSync };
});
vi.mock('node:fs/promises', async (original) => {
  const fs = await original<typeof import('node:fs/promises')>();
  const readdir = async (path: string, options: { withFileTypes: true }) => {
    if (path.endsWith(CLOSED)) throw failure('EACCES');
    return fs.readdir(path, options);
  };
  return { ...fs, readdir };
});

describe.each(ROWS.filter(({ section }) => section === 'A'))('$row: $title', ({ cases }) => {
  it.each(cases)('$verdict: $name', async (one) => {
    const { index } = await checkCase(one);
    const names = index.leftOut.map(({ file }) => file);
    for (const { slices } of index.stacks) {
      for (const { file } of slices) expect(names).not.toContain(file);
    }
  });
});

describe('Section A', () => {
  it('has every row from 1 to 18', () => {
    const rows = ROWS.filter(({ section }) => section === 'A').map(({ row }) => row);
    expect(rows).toEqual(Array.from({ length: 18 }, (_, index) => index + 1));
  });

  it('finds nothing to say of a plain slice, which every case is compared with', async () => {
    const reading = await checkCase(plainRead('plain', ctSlice));
    expect(reading.index).toMatchObject({ files: 1, leftOut: [], stacks: [{ findings: [] }] });
  });

  it('2: tells a file that is no DICOM from its first KiB, whatever its size', () => {
    for (const file of ROWS.find(({ row }) => row === 2)?.cases ?? []) {
      const bytes = Object.entries(file.build()).find(([name]) => name !== 'slice')?.[1];
      const first = new Uint8Array(1024);
      first.set((bytes ?? new Uint8Array(0)).subarray(0, 1024));
      expect(readHeader(first, 5_000_000)).toMatchObject({ kind: 'leftOut', code: 'not-dicom' });
    }
  });

  it('11: copies nothing of the preamble', async () => {
    for (const one of ROWS.find(({ row }) => row === 11)?.cases ?? []) {
      const reading = await checkCase(one);
      expect(JSON.stringify(reading.index)).not.toContain('DONOTCOPY');
    }
  });

  it('14: tells progress over thousands of files, goes no deeper than its bound, and stops when told', async () => {
    const root = await temporaryFolder();
    const deep = join(root, ...Array.from({ length: DEEPEST + 5 }, () => 'd'));
    await mkdir(deep, { recursive: true });
    for (let folder = 0; folder < 4; folder++) {
      await mkdir(join(root, `f${folder}`));
      const names = Array.from({ length: 500 }, (_, index) => join(root, `f${folder}`, `${index}`));
      await Promise.all(names.map((name) => writeFile(name, '')));
    }
    const told: number[] = [];
    const scan = await scanFolder(root, { onProgress: ({ done }) => told.push(done) });
    expect(scan).toMatchObject({
      ok: true,
      value: { seen: 2000, leftOut: [{ code: 'too-deep' }] },
    });
    expect(told).toEqual([500, 1000, 1500, 2000]);

    const stop = new AbortController();
    const stopped = await scanFolder(root, {
      signal: stop.signal,
      onProgress: () => stop.abort(),
    });
    expect(stopped).toMatchObject({ ok: false, refusal: { code: 'cancelled' } });
  });
});
