import { describe, it } from 'vitest';
import { ROWS } from '../../corpus/rows/index.js';
import { checkCase } from './checkCase.js';

describe.each(ROWS.filter(({ section }) => section === 'E'))('$row: $title', ({ cases }) => {
  it.each(cases)('$verdict: $name', async (one) => {
    await checkCase(one);
  });
});
