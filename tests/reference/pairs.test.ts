/**
 * The `pairs` verb against studies whose images numpy and scipy make and pydicom writes (pairsStudies.py): nothing is
 * shared with the program, and labels, descriptions and series numbers tell nothing or the contrary.
 */
import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { PairEntry } from '../../app/cli/pairsDocument.js';
import { run } from '../../app/cli/run.js';
import { pythonHas } from '../support/python.js';

const PYTHON = '/usr/bin/python3';
/** 0.05 of the coarser pixel of the studies, 0.45 mm. */
const SHIFT_TOLERANCE_MM = 0.0225;

const available = pythonHas('numpy', 'scipy', 'pydicom');
const title = available
  ? 'pairs on studies that numpy and scipy made'
  : 'pairs on studies that numpy and scipy made (SKIPPED: install python3-pydicom and python3-scipy to run it)';

describe.skipIf(!available)(title, () => {
  let folder = '';
  let truth: Readonly<Record<string, readonly (readonly [string, string, number])[]>> = {};

  beforeAll(() => {
    folder = mkdtempSync(join(tmpdir(), 'pairs-'));
    const script = join(import.meta.dirname, 'pairsStudies.py');
    truth = JSON.parse(execFileSync(PYTHON, [script, folder], { encoding: 'utf8' }));
  }, 120_000);

  afterAll(() => rmSync(folder, { recursive: true, force: true }));

  async function pairsOf(name: string): Promise<{ code: number; pairs: readonly PairEntry[] }> {
    const printed: string[] = [];
    const code = await run(['pairs', name, '--json'], {
      out: (text) => printed.push(text),
      err: () => {},
      cwd: folder,
      signal: new AbortController().signal,
      watched: false,
      threads: 0,
    });
    return { code, pairs: JSON.parse(printed.join('')).pairs };
  }

  const named = (pairs: readonly PairEntry[]) =>
    pairs.map(({ softSeriesInstanceUid, sharpSeriesInstanceUid, phasePercent }) => [
      softSeriesInstanceUid,
      sharpSeriesInstanceUid,
      phasePercent,
    ]);

  it.each(['grid', 'field'])(
    '%s: finds the pair, soft and sharp in the right order, no shift',
    async (name) => {
      const { code, pairs } = await pairsOf(name);
      expect(code).toBe(0);
      expect(named(pairs)).toEqual(truth[name]);
      expect(pairs[0]?.verdict).toBe('pair');
      expect(pairs[0]?.sharpness.decided).toBe(true);
      expect(pairs[0]?.shiftMm).toBeLessThan(SHIFT_TOLERANCE_MM);
    },
    60_000,
  );

  it('phases: true pairs come first, phases are not crossed, patients not mixed, a copy comes last', async () => {
    const { code, pairs } = await pairsOf('phases');
    const expected = truth.phases ?? [];
    expect(code).toBe(0);
    const first = named(pairs.slice(0, expected.length));
    expect([...first].sort()).toEqual([...expected].sort());
    expect(pairs.slice(0, expected.length).map(({ verdict }) => verdict)).toEqual(
      expected.map(() => 'pair'),
    );
    // What is left is the soft stack and its copy.
    expect(pairs.length).toBe(expected.length + 1);
    expect(pairs.at(-1)?.verdict).toBe('reservations');
    expect(pairs.at(-1)?.sharpness.decided).toBe(false);
  }, 60_000);

  it('moved: measures the shift of the body and has a reservation for it', async () => {
    const { code, pairs } = await pairsOf('moved');
    expect([code, named(pairs)]).toEqual([0, truth.moved]);
    expect(pairs[0]?.verdict).toBe('reservations');
    // (0.5, −0.33) mm.
    expect(Math.abs((pairs[0]?.shiftMm ?? 0) - 0.5991)).toBeLessThan(SHIFT_TOLERANCE_MM);
    const differing = pairs[0]?.evidence.filter(({ state }) => state === 'differs');
    expect(differing?.map(({ check }) => check)).toEqual(['kernel label', 'shift']);
  }, 60_000);
});
