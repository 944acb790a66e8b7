/**
 * The `measure` verb against studies that pydicom writes and numpy measures (measureStudies.py): general-purpose
 * libraries, with formulas written anew there. Tolerance 1e-6: sums of some hundred values near 1000 round below that.
 */
import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { run } from '../../app/cli/run.js';
import { pythonHas } from '../support/python.js';

const PYTHON = '/usr/bin/python3';
const TOLERANCE = 1e-6;

const NUMBERS = [
  'meanHu',
  'sdHu',
  'minHu',
  'maxHu',
  'medianHu',
  'snr',
  'areaMm2',
  'sampledAreaMm2',
  'sliceOffsetMm',
] as const;

const WHOLE = ['n', 'sliceIndex', 'sopInstanceUid'] as const;

type Measured = Record<(typeof NUMBERS)[number], number> &
  Record<(typeof WHOLE)[number], number | string>;

interface Expected {
  readonly regions: readonly { id: string; soft: Measured | null; sharp: Measured | null }[];
  readonly soft: Readonly<Record<string, number>>;
  readonly sharp: Readonly<Record<string, number>>;
}

const available = pythonHas('numpy', 'pydicom');
const title = available
  ? 'measure equals numpy on files written by pydicom'
  : 'measure equals numpy (SKIPPED: install python3-pydicom and python3-numpy to run it)';

describe.skipIf(!available)(title, () => {
  let folder = '';

  beforeAll(() => {
    folder = mkdtempSync(join(tmpdir(), 'measure-'));
    execFileSync(PYTHON, [join(import.meta.dirname, 'measureStudies.py'), folder]);
  });

  afterAll(() => rmSync(folder, { recursive: true, force: true }));

  async function measured(name: string) {
    const printed: string[] = [];
    const said: string[] = [];
    const code = await run(['measure', `plan-${name}.json`, '--in', name, '--json'], {
      out: (text) => printed.push(text),
      err: (text) => said.push(text),
      cwd: folder,
      signal: new AbortController().signal,
      watched: false,
      threads: 0,
    });
    expect(said).toEqual([]);
    expect(code).toBe(0);
    const expected: Expected = JSON.parse(
      readFileSync(join(folder, `expected-${name}.json`), 'utf8'),
    );
    return { document: JSON.parse(printed.join('')), expected };
  }

  describe.each([
    ['equal', 'two stacks on one grid, signed and unsigned'],
    [
      'unlike',
      'oblique stacks of other field of view, centre and increment, rescale a slice, padding',
    ],
  ])('%s: %s', (name) => {
    it('gives n, mean, SD, extremes, median, SNR and areas of every region on both kernels', async () => {
      const { document, expected } = await measured(name);
      expect(document.regions.map(({ id }: { id: string }) => id)).toEqual(
        expected.regions.map(({ id }) => id),
      );
      for (const [index, region] of expected.regions.entries()) {
        for (const kernel of ['soft', 'sharp'] as const) {
          const want = region[kernel];
          const got = document.regions[index][kernel];
          const where = `${region.id} ${kernel}`;
          if (want === null) throw new Error(`${where} must lie on a slice`);
          for (const key of WHOLE) expect(got[key], `${where} ${key}`).toBe(want[key]);
          for (const key of NUMBERS) {
            expect(Math.abs(got[key] - want[key]), `${where} ${key}`).toBeLessThan(TOLERANCE);
          }
        }
      }
    });

    it('gives the contrast to noise with each of the four noises on both kernels', async () => {
      const { document, expected } = await measured(name);
      expect(document.contrasts).toHaveLength(4);
      for (const { id, soft, sharp, flags } of document.contrasts) {
        const noise = id.slice('C-'.length);
        // Flags of its regions may stand with a contrast; none of them takes its value away.
        expect(flags.every(({ code }: { code: string }) => !code.startsWith('no-'))).toBe(true);
        expect(Math.abs(soft - (expected.soft[noise] ?? Number.NaN))).toBeLessThan(TOLERANCE);
        expect(Math.abs(sharp - (expected.sharp[noise] ?? Number.NaN))).toBeLessThan(TOLERANCE);
      }
    });
  });
});
