import { execFileSync } from 'node:child_process';
import { existsSync, mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { run } from '../../app/cli/run.js';
import type { RegionValue } from '../../core/region/index.js';
import { CORPUS_ROOT, type CtSliceOptions, ctSlice } from '../corpus/ctSlice.js';
import { change } from '../corpus/element.js';

const SIDE = 64;
const SERIES = `${CORPUS_ROOT}.2.1`;
const hasTools = ['dcmcjpeg', 'dcmcjpls', 'dcmcrle', 'dcmconv', 'gdcmconv'].every((tool) =>
  existsSync(`/usr/bin/${tool}`),
);

const folder = mkdtempSync(join(tmpdir(), 'diptych-encodings-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

/** A linear congruential generator (Numerical Recipes' constants): the same noise at each run. */
function noisy(seed: number): Int16Array {
  let state = seed;
  return Int16Array.from({ length: SIDE * SIDE }, (_, index) => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return 1024 + (index % SIDE) * 4 + (state >>> 26) - 32;
  });
}

function write(name: string, slices: readonly CtSliceOptions[]): string {
  const path = join(folder, name);
  mkdirSync(path);
  for (const [index, slice] of slices.entries()) {
    writeFileSync(join(path, `${index}.dcm`), ctSlice({ rows: SIDE, columns: SIDE, ...slice }));
  }
  return path;
}

async function cli(...argv: readonly string[]): Promise<unknown> {
  const out: string[] = [];
  const err: string[] = [];
  const code = await run([...argv, '--json'], {
    out: (text) => out.push(text),
    err: (text) => err.push(text),
    cwd: folder,
    signal: new AbortController().signal,
    watched: false,
    threads: 0,
  });
  if (code !== 0) throw new Error(err.join(''));
  return JSON.parse(out.join(''));
}

const PLAN = {
  plan: 1,
  pair: { soft: { seriesInstanceUid: SERIES } },
  regions: [
    {
      id: 'L1',
      role: 'lumen',
      shape: { kind: 'ellipse', centreMm: [-2, -5, 1], radiiMm: [2, 3] },
    },
    {
      id: 'W1',
      role: 'wall',
      shape: {
        kind: 'outline',
        pointsMm: [
          [-9, -15, 2],
          [-2, -15, 2],
          [1, -8, 2],
          [-6, -8, 2],
        ],
      },
    },
  ],
  contrasts: [{ id: 'C1', lumen: 'L1', wall: 'W1', noise: 'pooled' }],
};

interface Measured {
  readonly regions: readonly { readonly id: string; readonly soft: RegionValue }[];
  readonly contrasts: readonly { readonly flags: readonly { readonly code: string }[] }[];
}

async function measure(path: string): Promise<Measured> {
  writeFileSync(join(folder, 'plan.json'), JSON.stringify(PLAN));
  return (await cli('measure', 'plan.json', '--in', path)) as Measured;
}

const numbersOf = ({ regions }: Measured) =>
  regions.map(({ soft: { flags: _, ...numbers } }) => numbers);

const ENCODINGS = [
  ['implicit VR', 'dcmconv', ['+ti']],
  ['big endian', 'dcmconv', ['+tb']],
  ['deflated', 'dcmconv', ['+td']],
  ['RLE', 'dcmcrle', []],
  ['JPEG lossless, first order', 'dcmcjpeg', ['+e1']],
  ['JPEG lossless, process 14', 'dcmcjpeg', ['+el']],
  ['JPEG-LS', 'dcmcjpls', ['+el']],
  ['JPEG 2000', 'gdcmconv', ['--j2k']],
] as const;

const LOSSY = [
  ['JPEG 2000 with loss', 'gdcmconv', ['-K', '-Y', '--irreversible', '-r', '1.8']],
  ['near-lossless JPEG-LS', 'gdcmconv', ['-L', '-Y', '-e', '2']],
] as const;

describe.skipIf(!hasTools)('one series in many encodings (skipped without dcmtk and gdcm)', () => {
  let plain = '';
  let expected: Measured;
  beforeAll(async () => {
    plain = write(
      'explicit VR',
      [0, 1, 2, 3].map((z) => ({ z, number: z + 1, stored: noisy(z + 1) })),
    );
    expected = await measure(plain);
    for (const { soft } of expected.regions) {
      expect(soft.n).toBeGreaterThan(100);
      expect(soft.sdHu).toBeGreaterThan(10);
    }
  });

  function encode(name: string, tool: string, flags: readonly string[]): string {
    const path = join(folder, name);
    mkdirSync(path);
    for (const file of readdirSync(plain)) {
      execFileSync(`/usr/bin/${tool}`, [...flags, join(plain, file), join(path, file)], {
        stdio: 'ignore',
      });
    }
    return path;
  }

  it.each(ENCODINGS)('measures the same in %s', async (name, tool, flags) => {
    expect(numbersOf(await measure(encode(name, tool, flags)))).toEqual(numbersOf(expected));
  });

  it.each(LOSSY)('measures within 3 HU in %s, and marks it', async (name, tool, flags) => {
    const measured = await measure(encode(name, tool, flags));
    for (const [index, { soft }] of measured.regions.entries()) {
      const before = expected.regions[index]?.soft;
      expect(Math.abs((soft.meanHu ?? Infinity) - (before?.meanHu ?? 0))).toBeLessThanOrEqual(3);
      expect(Math.abs((soft.sdHu ?? Infinity) - (before?.sdHu ?? 0))).toBeLessThanOrEqual(3);
      expect(soft.flags.map(({ code }) => code)).toContain('lossy');
    }
    expect(measured.contrasts[0]?.flags.map(({ code }) => code)).toContain('lossy');
    expect(expected.contrasts[0]?.flags).toEqual([]);
  });

  it('knows a compressed copy for the same image, and another image under its UID for another', async () => {
    const path = encode('copies', 'dcmcjpls', ['+el']);
    writeFileSync(
      join(path, 'native.dcm'),
      ctSlice({ rows: SIDE, columns: SIDE, z: 0, number: 1, stored: noisy(1) }),
    );
    writeFileSync(
      join(path, 'other.dcm'),
      ctSlice({ rows: SIDE, columns: SIDE, z: 3, number: 4, stored: noisy(99) }),
    );
    const { stacks, leftOut } = (await cli('index', path)) as Index;
    expect(leftOut.map(({ file, code }) => [file, code])).toEqual([
      ['3.dcm', 'same-uid-other-pixels'],
      ['native.dcm', 'duplicate'],
      ['other.dcm', 'same-uid-other-pixels'],
    ]);
    expect(stacks.map(({ slices }) => slices)).toEqual([3]);
  });
});

interface Index {
  readonly stacks: readonly {
    readonly key: string;
    readonly patientId: string;
    readonly seriesInstanceUid: string;
    readonly phasePercent: number | null;
    readonly slices: number;
    readonly findings: readonly { readonly code: string }[];
  }[];
  readonly leftOut: readonly { readonly file: string; readonly code: string }[];
}

describe('stacks of a study', () => {
  it('are four where two phases stand in each of two series, and a second patient stays apart', async () => {
    const phase = (value: number) => ({ tag: 0x00209241, vr: 'FL', value }) as const;
    const path = write('phases', [
      ...['soft', 'sharp'].flatMap((_, series) =>
        [40, 75].flatMap((percent) =>
          [0, 1, 2].map((z) => ({
            z,
            series: `${CORPUS_ROOT}.2.${series + 1}`,
            number: percent * 10 + z,
            stored: noisy(percent + z),
            change: change(phase(percent)),
          })),
        ),
      ),
      ...[0, 1, 2].map((z) => ({
        z,
        number: 900 + z,
        stored: noisy(z),
        change: change(phase(75), { tag: 0x00100020, vr: 'LO', value: 'C-2' }),
      })),
    ]);
    const { stacks, leftOut } = (await cli('index', path)) as Index;
    expect(leftOut).toEqual([]);
    expect(
      stacks.map((stack) => [
        stack.patientId,
        stack.seriesInstanceUid,
        stack.phasePercent,
        stack.slices,
      ]),
    ).toEqual([
      ['C-1', `${CORPUS_ROOT}.2.1`, 40, 3],
      ['C-1', `${CORPUS_ROOT}.2.1`, 75, 3],
      ['C-1', `${CORPUS_ROOT}.2.2`, 40, 3],
      ['C-1', `${CORPUS_ROOT}.2.2`, 75, 3],
      ['C-2', `${CORPUS_ROOT}.2.1`, 75, 3],
    ]);
    expect(new Set(stacks.map(({ key }) => key)).size).toBe(5);
  });
});
