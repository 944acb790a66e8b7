import { describe, expect, it } from 'vitest';
import { phaseEvidence } from '../../../../core/pairing/phaseEvidence.js';
import { stackOf } from './stackFixture.js';

const without = { phasePercent: undefined } as never;
const delayed = (series: number, triggerTimeMs: number, nominalIntervalMs?: number) =>
  stackOf({
    series,
    acquisition: {
      ...(without as object),
      triggerTimeMs,
      ...(nominalIntervalMs !== undefined && { nominalIntervalMs }),
    },
  });

describe('phaseEvidence', () => {
  it('compares stated percentages, whatever the delays', () => {
    const a = stackOf({ series: 1, acquisition: { phasePercent: 75, triggerTimeMs: 600 } });
    const b = stackOf({ series: 2, acquisition: { phasePercent: 75, triggerTimeMs: 640 } });
    const c = stackOf({ series: 3, acquisition: { phasePercent: 40 } });
    expect(phaseEvidence(a, b)).toEqual({
      check: 'phase',
      state: 'agrees',
      text: 'same phase: 75 %',
    });
    expect(phaseEvidence(a, c).text).toBe('another phase: 75 % and 40 %');
  });

  it('holds trigger delays against R-R intervals and names both readings', () => {
    expect(phaseEvidence(delayed(1, 600, 800), delayed(2, 640, 853))).toEqual({
      check: 'phase',
      state: 'agrees',
      text: 'same phase by trigger delay: trigger delay 600 ms of an R-R interval of 800 ms (75.0 %) and trigger delay 640 ms of an R-R interval of 853 ms (75.0 %)',
    });
    expect(phaseEvidence(delayed(1, 600, 800), delayed(2, 320, 800)).state).toBe('differs');
    expect(phaseEvidence(delayed(1, 600, 800), delayed(2, 624, 800)).state).toBe('unknown');
  });

  it('holds a stated percentage against a delay', () => {
    const stated = stackOf({ series: 1 });
    const got = phaseEvidence(stated, delayed(2, 600, 800));
    expect([got.state, got.text]).toEqual([
      'agrees',
      'same phase by trigger delay: 75 % as stated and trigger delay 600 ms of an R-R interval of 800 ms (75.0 %)',
    ]);
  });

  it('proves another phase by other delays without an R-R interval, and nothing by the same', () => {
    expect(phaseEvidence(delayed(1, 600), delayed(2, 300)).state).toBe('differs');
    expect(phaseEvidence(delayed(1, 600), delayed(2, 600)).state).toBe('unknown');
  });

  it('is unknown where nothing is stated, and where a stack holds several delays', () => {
    const silent = stackOf({ series: 1, acquisition: without });
    expect(phaseEvidence(silent, stackOf({ series: 2 }))).toEqual({
      check: 'phase',
      state: 'unknown',
      text: 'phase: not stated and 75 % as stated',
    });
  });
});
