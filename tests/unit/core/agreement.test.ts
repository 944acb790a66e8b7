import { expect, it } from 'vitest';
import { agreement } from '../../../core/agreement/index.js';

// Peak flow by two meters, first readings: Bland & Altman 1986, Lancet i:307.
const WRIGHT = [
  494, 395, 516, 434, 476, 557, 413, 442, 650, 433, 417, 656, 267, 478, 178, 423, 427,
];
const MINI = [512, 430, 520, 428, 500, 600, 364, 380, 658, 445, 432, 626, 260, 477, 259, 350, 451];

it('puts limits, repeatability and intraclass correlation together, and cautions where pairs are few', () => {
  const found = agreement(WRIGHT, MINI);
  if ('reason' in found) throw new Error(found.reason);
  expect(found.n).toBe(17);
  expect(found.limits.bias.value).toBeCloseTo(-2.117647058824, 9);
  expect(found.limits.sd).toBeCloseTo(38.765129873607, 9);
  expect(found.repeatability.withinSd).toBeCloseTo(Math.sqrt(24120 / 34), 9);
  expect(found.intraclass?.twoWayConsistency.value).toBeGreaterThan(0.9);
  expect(found.caution).toContain('17 pairs only');
});

it('says why there is no agreement of fewer than three pairs', () => {
  expect(agreement([1, 2], [1, 3])).toEqual({
    reason: '2 regions were read twice here: agreement needs at least 3.',
  });
});
