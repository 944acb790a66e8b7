import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { limitsTable, withLimitsTable } from '../../corpus/limitsTable.js';
import { ROWS } from '../../corpus/rows/index.js';

const README = new URL('../../../README.md', import.meta.url);

describe('The table of limits', () => {
  it('has each row once, ascending', () => {
    const rows = ROWS.map(({ row }) => row);
    expect(rows).toEqual([...new Set(rows)].sort((a, b) => a - b));
  });

  it('names a code for every verdict but READ, in kebab case', () => {
    for (const { row, cases } of ROWS) {
      for (const { verdict, code } of cases) {
        if (verdict === 'READ') expect(code, `row ${row}`).toBeUndefined();
        else expect(code, `row ${row}`).toMatch(/^[a-z0-9]+(-[a-z0-9]+)*$/);
      }
    }
  });

  it('is written as a table of five columns, with bars and tags of its texts made harmless', () => {
    const table = limitsTable([
      {
        row: 7,
        section: 'A',
        title: 'a | b <c>',
        outcome: 'read',
        cases: [
          { name: 'one', verdict: 'READ', build: () => ({}) },
          { name: 'two', verdict: 'SKIP', code: 'no-image', build: () => ({}) },
        ],
      },
    ]);
    expect(table.split('\n').at(-1)).toBe(
      '| 7 | a \\| b &lt;c> | READ, SKIP | Read. | `no-image` |',
    );
  });

  it('stands in the README as the registry has it; `node tests/corpus/writeLimits.mjs` renews it', () => {
    const text = readFileSync(README, 'utf8');
    expect(text).toBe(withLimitsTable(text, ROWS));
  });
});
