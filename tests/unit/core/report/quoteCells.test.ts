import { expect, it } from 'vitest';
import { NO_QUOTE, quoteCells } from '../../../../core/report/quoteCells.js';

const density = { quote: 'soft', reason: 'Density: less noise.' } as const;

it('A quote is said with its kernel, who says so and why', () => {
  expect(quoteCells({ ...density, by: 'proposal' })).toEqual({
    kernel: 'soft',
    by: 'proposal',
    reason: 'Density: less noise.',
    sentence: 'Quoted: soft kernel, as proposed. Density: less noise.',
  });
  expect(quoteCells({ quote: 'both', reason: 'shown in conference', by: 'reader' }).sentence).toBe(
    'Quoted: both kernels, chosen by the reader: shown in conference.',
  );
});

it('A reader’s choice without a reason says so, and with what the rules propose instead', () => {
  const instead = { quote: 'neither', reason: 'A strut lies within the blur.' } as const;
  expect(quoteCells({ quote: 'soft', reason: ' ', by: 'reader', instead }).sentence).toBe(
    'Quoted: soft kernel, chosen by the reader; no reason is stated. The rules propose neither: A strut lies within the blur.',
  );
});

it('Nothing is said where nothing is quoted', () => {
  expect(quoteCells({ quote: null, reason: 'No value.', by: 'proposal' })).toEqual(NO_QUOTE);
  expect(quoteCells({ quote: null, reason: '', by: 'reader', instead: density })).toEqual(NO_QUOTE);
});
