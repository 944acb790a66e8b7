import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { run } from '../../../../app/cli/run.js';
import { FLAGS } from '../../../../core/region/index.js';
import { noisyStack } from '../../../corpus/noisyPair.js';

const [SOFT, SHARP] = ['2.25.66001.1', '2.25.66001.2'];

describe('measure, on stacks with noise', () => {
  let folder = '';

  beforeAll(() => {
    folder = mkdtempSync(join(tmpdir(), 'noise-'));
    noisyStack(join(folder, 'study'), { kind: 'soft', series: SOFT, number: 3 });
    noisyStack(join(folder, 'study'), { kind: 'sharp', series: SHARP, number: 4 });
  });

  afterAll(() => rmSync(folder, { recursive: true, force: true }));

  async function measured(pair: object, said: readonly string[] = []) {
    const plan = {
      plan: 1,
      pair,
      regions: [
        {
          id: 'R1',
          role: 'reference',
          shape: { kind: 'ellipse', centreMm: [22, 12, 4], radiiMm: [4, 4] },
        },
      ],
    };
    writeFileSync(join(folder, 'plan.json'), JSON.stringify(plan));
    const out: string[] = [];
    const err: string[] = [];
    await run(['measure', 'plan.json', '--in', 'study', '--json'], {
      out: (text) => out.push(text),
      err: (text) => err.push(text),
      cwd: folder,
      signal: new AbortController().signal,
      watched: false,
      threads: 0,
    });
    expect(err).toEqual(said);
    return JSON.parse(out.join('')).regions[0];
  }

  it('gives each kernel the standard error that its own noise makes', async () => {
    const { soft, sharp } = await measured({
      soft: { seriesInstanceUid: SOFT },
      sharp: { seriesInstanceUid: SHARP },
    });
    for (const { standardErrorHu, sdHu, n, placementHu, flags } of [soft, sharp]) {
      expect(flags.map(({ code }: { code: string }) => code)).not.toContain('no-standard-error');
      // Smoothed noise is correlated, so its mean is less sure than SD/√n says.
      expect(standardErrorHu).toBeGreaterThan(sdHu / Math.sqrt(n));
      expect(standardErrorHu).toBeLessThan(sdHu);
      expect(placementHu).toBeGreaterThan(0);
    }
  });

  it('gives none to a stack that is measured alone, and says why', async () => {
    const { soft, sharp } = await measured({ soft: { seriesInstanceUid: SOFT } });
    expect(sharp).toBeNull();
    expect(soft.standardErrorHu).toBeNull();
    expect(soft.flags).toContainEqual(FLAGS.noStandardErrorAlone);
  });

  it('gives none to a stack that is paired with itself', async () => {
    const one = { seriesInstanceUid: SOFT };
    const { soft } = await measured({ soft: one, sharp: one }, [
      'Soft and sharp are the same stack: the plan names one series twice.\n',
    ]);
    expect(soft.flags).toContainEqual(FLAGS.noStandardErrorAlone);
  });
});
