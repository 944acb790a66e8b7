import { describe, expect, it } from 'vitest';
import {
  blandAltman,
  fQuantile,
  intraclass,
  repeatability,
  studentTQuantile,
} from '../../core/agreement/index.js';

// Bland JM, Altman DG. Lancet 1986; i: 307–310: peak expiratory flow, l/min, two readings with each of two meters.
const WRIGHT_1 = [
  494, 395, 516, 434, 476, 557, 413, 442, 650, 433, 417, 656, 267, 478, 178, 423, 427,
];
const WRIGHT_2 = [
  490, 397, 512, 401, 470, 611, 415, 431, 638, 429, 420, 633, 275, 492, 165, 372, 421,
];
const MINI_1 = [
  512, 430, 520, 428, 500, 600, 364, 380, 658, 445, 432, 626, 260, 477, 259, 350, 451,
];
const MINI_2 = [
  525, 415, 508, 444, 500, 625, 460, 390, 642, 432, 420, 605, 227, 467, 268, 370, 443,
];

describe('the worked example of Bland and Altman 1986', () => {
  const got = blandAltman(WRIGHT_1, MINI_1);

  it('has bias −2.1 and SD 38.8 l/min', () => {
    expect(got?.n).toBe(17);
    expect(got?.bias.value).toBeCloseTo(-2.117647058824, 10);
    expect(got?.sd).toBeCloseTo(38.765129873607, 10);
  });

  it('has limits of agreement from the unrounded values', () => {
    expect(got?.lower.value).toBeCloseTo(-78.097302, 5);
    expect(got?.upper.value).toBeCloseTo(73.862007, 5);
  });

  it('has the confidence intervals of bias and limits', () => {
    expect(got?.bias.low).toBeCloseTo(-22.0488, 3);
    expect(got?.bias.high).toBeCloseTo(17.8135, 3);
    // The paper's intervals start from limits at 2 SD; these have the same width, 2 × 2.1199 × 16.2846.
    expect((got?.lower.high ?? 0) - (got?.lower.low ?? 0)).toBeCloseTo(
      2 * 2.119905299 * 16.284612,
      4,
    );
  });

  it('has the published repeatability of both meters', () => {
    const wright = repeatability(WRIGHT_1, WRIGHT_2);
    const mini = repeatability(MINI_1, MINI_2);
    expect(wright?.withinSd).toBeCloseTo(15.306669, 6);
    expect(mini?.withinSd).toBeCloseTo(19.910831, 6);
    expect(wright?.coefficient).toBeCloseTo(42.4279, 3);
    expect(mini?.coefficient).toBeCloseTo(55.19, 3);
  });

  it('says nothing of one pair', () => {
    expect(blandAltman([1], [2])).toBeUndefined();
    expect(repeatability([], [])).toBeUndefined();
  });
});

// Shrout PE, Fleiss JL. Psychol Bull 1979; 86: 420–428: six targets, four judges; values unrounded by exact arithmetic.
const TARGETS = [
  [9, 2, 5, 8],
  [6, 1, 3, 2],
  [8, 4, 6, 8],
  [7, 1, 2, 6],
  [10, 5, 6, 9],
  [6, 2, 4, 7],
];

describe('the worked example of Shrout and Fleiss 1979', () => {
  const got = intraclass(TARGETS);

  it('has ICC(1,1) .17, ICC(2,1) .29, ICC(3,1) .71', () => {
    expect(got?.oneWay.value).toBeCloseTo(0.16574177, 8);
    expect(got?.twoWayAgreement.value).toBeCloseTo(0.28976378, 8);
    expect(got?.twoWayConsistency.value).toBeCloseTo(0.71484071, 8);
  });

  it('has their 95 % intervals', () => {
    expect([got?.oneWay.low, got?.oneWay.high].map((value) => value?.toFixed(4))).toEqual([
      '-0.1329',
      '0.7226',
    ]);
    expect([got?.twoWayAgreement.low, got?.twoWayAgreement.high].map((v) => v?.toFixed(4))).toEqual(
      ['0.0188', '0.7611'],
    );
    expect(
      [got?.twoWayConsistency.low, got?.twoWayConsistency.high].map((v) => v?.toFixed(4)),
    ).toEqual(['0.3425', '0.9459']);
  });

  it('says nothing where nothing varies', () => {
    expect(
      intraclass([
        [1, 1],
        [1, 1],
      ]),
    ).toBeUndefined();
    expect(intraclass([[1, 2]])).toBeUndefined();
  });
});

// Student's t and F from printed tables: t(0.975; 16) 2.119905, t(0.975; 1) 12.7062; F(0.95; 5, 10) 3.3258 (from memory).
describe('quantiles', () => {
  it('agree with printed tables', () => {
    expect(studentTQuantile(0.975, 16)).toBeCloseTo(2.119905299, 8);
    expect(studentTQuantile(0.975, 1)).toBeCloseTo(12.7062, 4);
    expect(studentTQuantile(0.025, 16)).toBeCloseTo(-2.119905299, 8);
    expect(fQuantile(0.95, 5, 10)).toBeCloseTo(3.3258, 4);
  });
});
