import { describe, expect, it } from 'vitest';
import { statistics } from '../../core/region/index.js';

// NIST Statistical Reference Datasets, univariate summary statistics, certified values.
const alternating = (centre: number): number[] => {
  const base = Math.floor(centre);
  return [
    centre,
    ...Array.from({ length: 1000 }, (_, i) => (i % 2 === 0 ? base + 0.1 : base + 0.3)),
  ];
};

const MAVRO = `2.00180 2.00170 2.00180 2.00190 2.00180 2.00170 2.00150 2.00140 2.00150 2.00150 2.00170 2.00180
2.00180 2.00190 2.00190 2.00210 2.00200 2.00160 2.00140 2.00130 2.00130 2.00150 2.00150 2.00160 2.00150 2.00140
2.00130 2.00140 2.00150 2.00140 2.00150 2.00160 2.00150 2.00160 2.00190 2.00200 2.00200 2.00210 2.00220 2.00230
2.00240 2.00250 2.00270 2.00260 2.00260 2.00260 2.00270 2.00260 2.00250 2.00240`;

const SETS = [
  {
    name: 'Mavro',
    values: MAVRO.split(/\s+/).map(Number),
    mean: 2.001856,
    sd: 0.000429123454003053,
    sdTolerance: 1e-12,
  },
  {
    name: 'NumAcc1',
    values: [10000001, 10000003, 10000002],
    mean: 10000002,
    sd: 1,
    sdTolerance: 1e-15,
  },
  { name: 'NumAcc2', values: alternating(1.2), mean: 1.2, sd: 0.1, sdTolerance: 1e-13 },
  { name: 'NumAcc3', values: alternating(1000000.2), mean: 1000000.2, sd: 0.1, sdTolerance: 1e-9 },
  {
    name: 'NumAcc4',
    values: alternating(10000000.2),
    mean: 10000000.2,
    sd: 0.1,
    sdTolerance: 1e-7,
  },
];

describe('statistics on the NIST sets', () => {
  it.each(SETS)(
    '$name: mean to 1e-15 and sample SD as the set allows',
    ({ values, mean, sd, sdTolerance }) => {
      const got = statistics(values);
      expect(Math.abs((got.mean ?? 0) / mean - 1)).toBeLessThanOrEqual(1e-15);
      expect(Math.abs((got.sd ?? 0) / sd - 1)).toBeLessThanOrEqual(sdTolerance);
    },
  );
});

describe('statistics at the ends', () => {
  it('has no mean of nothing and no SD of one value', () => {
    expect(statistics([])).toEqual({
      n: 0,
      mean: undefined,
      sd: undefined,
      min: undefined,
      max: undefined,
      median: undefined,
    });
    expect(statistics([7])).toEqual({ n: 1, mean: 7, sd: undefined, min: 7, max: 7, median: 7 });
  });

  it('takes the mean of the two middle values as median', () => {
    expect(statistics([4, 1, 3, 2]).median).toBe(2.5);
  });
});
