import { describe, expect, it } from 'vitest';
import { proposePairs } from '../../../../core/pairing/index.js';
import { byParity, countingReader, stackOf } from './stackFixture.js';

const options = { measureSharpness: byParity };
const names = (pairs: Awaited<ReturnType<typeof proposePairs>>) =>
  pairs.map(({ soft, sharp, verdict }) =>
    [soft, sharp]
      .map(({ slices }) => slices[0].image.acquisition.seriesNumber)
      .concat()
      .join('>')
      .concat(` ${verdict}`),
  );

describe('proposePairs', () => {
  it('puts the true pair before a copy of one kernel, and both before a short stack', async () => {
    const { read } = countingReader();
    const stacks = [
      stackOf({ series: 1, slices: 3 }),
      stackOf({ series: 2, slices: 20 }),
      stackOf({ series: 3, slices: 20 }),
      stackOf({ series: 5, slices: 20 }),
    ];
    expect(names(await proposePairs(stacks, read, options))).toEqual([
      '3>2 pair',
      '5>2 pair',
      '3>5 reservations',
      '1>2 pair',
      '1>3 reservations',
      '1>5 reservations',
    ]);
  });

  it('never crosses phases and never mixes patients', async () => {
    const { read } = countingReader();
    const phase = (phasePercent: number) => ({ acquisition: { phasePercent } });
    const stacks = [
      stackOf({ series: 1, ...phase(40) }),
      stackOf({ series: 3, ...phase(75) }),
      stackOf({ series: 2, ...phase(40) }),
      stackOf({ series: 4, ...phase(75) }),
      stackOf({ series: 6, ...phase(75), identity: { patientId: 'C-2' } }),
    ];
    expect(names(await proposePairs(stacks, read, options))).toEqual(['1>2 pair', '3>4 pair']);
  });

  it('returns refused pairs only where nothing else is there, with the reason', async () => {
    const { read, count } = countingReader();
    const stacks = [
      stackOf({ series: 1 }),
      stackOf({ series: 2, acquisition: { phasePercent: 40 } }),
    ];
    const pairs = await proposePairs(stacks, read, options);
    expect(names(pairs)).toEqual(['1>2 refused']);
    expect(pairs[0]?.refusedFor[0]?.text).toBe('another phase: 75 % and 40 %');
    expect(count()).toBe(0);
    expect(await proposePairs(stacks.slice(1), read, options)).toEqual([]);
  });

  it('reads a few slices of ten stacks of 500, whether they are five phases or one', async () => {
    const phases = Array.from({ length: 10 }, (_, index) =>
      stackOf({
        series: index + 1,
        slices: 500,
        spacingMm: 0.4,
        acquisition: { phasePercent: 40 + 5 * Math.floor(index / 2) },
      }),
    );
    const counting = countingReader();
    const pairs = await proposePairs(phases, counting.read, options);
    expect(pairs.map(({ verdict }) => verdict)).toEqual(Array(5).fill('pair'));
    // Three places of each and the neighbours of the middle one, of 5,000 slices; 3 and 9 without sharpness.
    expect([counting.most() <= 9, counting.count() <= 60]).toEqual([true, true]);

    const alike = Array.from({ length: 10 }, (_, index) =>
      stackOf({ series: index + 1, slices: 500, spacingMm: 0.4 }),
    );
    const again = countingReader();
    const ranked = await proposePairs(alike, again.read, options);
    expect(ranked.length).toBe(45);
    expect(ranked[0]?.verdict).toBe('pair');
    expect(ranked.filter(({ measured }) => measured).length).toBe(6);
    const unmeasured = ranked.find(({ measured }) => !measured);
    expect(unmeasured?.evidence.find(({ check }) => check === 'shift')?.text).toBe(
      'shift not measured: only the most promising pairs were looked at',
    );
    expect(again.count()).toBeLessThanOrEqual(100);
  });

  it('stops when it is told to, and tells how far it is', async () => {
    const { read } = countingReader();
    const signal = { aborted: false };
    const told: number[] = [];
    const pairs = await proposePairs(
      [stackOf({ series: 1 }), stackOf({ series: 2 }), stackOf({ series: 3 })],
      read,
      {
        ...options,
        signal,
        onProgress({ done, total }) {
          told.push(done, total);
          signal.aborted = true;
        },
      },
    );
    expect(told).toEqual([0, 3]);
    expect(pairs.filter(({ measured }) => measured).length).toBe(1);
  });
});
