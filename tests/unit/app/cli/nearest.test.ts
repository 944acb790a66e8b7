import { describe, expect, it } from 'vitest';
import { editDistance, nearest } from '../../../../app/cli/nearest.js';

describe('editDistance', () => {
  // kitten → sitting is the usual textbook example of the Levenshtein distance (from memory).
  it.each([
    ['kitten', 'sitting', 3],
    ['', 'abc', 3],
    ['abc', 'abc', 0],
    ['index', 'idnex', 1],
  ])('of %j and %j is %d', (a, b, distance) => {
    expect(editDistance(a, b)).toBe(distance);
    expect(editDistance(b, a)).toBe(distance);
  });
});

describe('nearest', () => {
  it('offers a word that is near or begun, and nothing otherwise', () => {
    const verbs = ['index', 'measure', 'export'];
    expect(nearest('mesure', verbs)).toBe('measure');
    expect(nearest('exp', verbs)).toBe('export');
    expect(nearest('zzz', verbs)).toBeUndefined();
  });
});
