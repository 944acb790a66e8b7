import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { run } from '../../../../app/cli/run.js';
import { CORPUS_ROOT, ctSlice } from '../../../corpus/ctSlice.js';
import { pairFiles, SHARP_SERIES, SOFT_SERIES } from '../../core/note/noteFixture.js';

let folder = '';

beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'cli-pairs-'));
  const write = (name: string, files: readonly Uint8Array[]): void => {
    mkdirSync(join(folder, name));
    files.forEach((bytes, index) => {
      writeFileSync(join(folder, name, `i${index}`), bytes);
    });
  };
  const phase = (value: number) => ({
    2134593: { tag: 0x00209241, vr: 'FL', value } as const,
  });
  write('study', pairFiles(phase(75)));
  write('crossed', [
    ...[0, 1, 2].map((z) => ctSlice({ z, number: z, change: phase(75) })),
    ...[0, 1, 2].map((z) =>
      ctSlice({ z, number: z, series: `${CORPUS_ROOT}.2.2`, change: phase(40) }),
    ),
  ]);
  write('single', [ctSlice()]);
  write('empty', []);
});

afterAll(() => rmSync(folder, { recursive: true }));

async function cli(...argv: readonly string[]) {
  const out: string[] = [];
  const err: string[] = [];
  const code = await run(argv, {
    out: (text) => out.push(text),
    err: (text) => err.push(text),
    cwd: folder,
    signal: new AbortController().signal,
    watched: false,
    threads: 0,
  });
  return { code, out: out.join(''), err: err.join('') };
}

describe('pairs', () => {
  it('prints exactly one document with every key, null where nothing could be measured', async () => {
    const { code, out, err } = await cli('pairs', 'study', '--json');
    expect([code, err]).toEqual([0, '']);
    const { pairs, ...rest } = JSON.parse(out);
    expect(rest).toEqual({});
    const [{ evidence, ...pair }, ...others] = pairs;
    expect(others).toEqual([]);
    // The fixture is 20 × 30 pixels: too small a field for a shift.
    expect(pair).toEqual({
      soft: SOFT_SERIES,
      sharp: SHARP_SERIES,
      softSeriesInstanceUid: SOFT_SERIES,
      sharpSeriesInstanceUid: SHARP_SERIES,
      phasePercent: 75,
      verdict: 'reservations',
      sharpness: {
        decided: false,
        noiseSoftHu: null,
        noiseSharpHu: null,
        frequencySoft: null,
        frequencySharp: null,
      },
      shiftMm: null,
    });
    expect(Object.keys(evidence[0])).toEqual(['check', 'state', 'text']);
    expect(evidence.map(({ check }: { check: string }) => check)).toEqual([
      'patient',
      'study',
      'frame of reference',
      'acquisition',
      'phase',
      'orientation',
      'overlap',
      'slice spacing',
      'thickness',
      'pixel spacing',
      'field of view',
      'tilt',
      'tube voltage',
      'contrast agent',
      'lossy compression',
      'kernel label',
      'shift',
      'sharpness',
    ]);
  });

  it('prints a table and the evidence, what speaks against the pair first', async () => {
    const { code, out } = await cli('pairs', 'study');
    expect(code).toBe(0);
    expect(out).toMatch(/^Pair {2}Verdict/);
    expect(out).toContain(' with reservations ');
    expect(out).toContain('  ! ? shift not measured: the common field is too small\n');
    expect(out.indexOf('  ! ? shift')).toBeLessThan(out.indexOf('same patient'));
  });

  it('exits with 1 when the best pair is refused, and says why', async () => {
    const { code, out } = await cli('pairs', 'crossed', '--json');
    expect(code).toBe(1);
    const [pair] = JSON.parse(out).pairs;
    expect([pair.verdict, pair.phasePercent, pair.shiftMm]).toEqual(['refused', null, null]);
    expect(pair.evidence).toContainEqual({
      check: 'phase',
      state: 'differs',
      text: 'another phase: 75 % and 40 %',
    });
  });

  it('exits with 1 when the folder holds no two stacks', async () => {
    expect(await cli('pairs', 'single')).toEqual({
      code: 1,
      out: 'No pair: the folder holds one stack.\n',
      err: '',
    });
    const { code, out } = await cli('pairs', 'empty', '--json');
    expect([code, JSON.parse(out)]).toEqual([1, { pairs: [] }]);
  });

  it('refuses a folder that is not there with exit code 2', async () => {
    expect((await cli('pairs', 'nowhere')).code).toBe(2);
  });
});
