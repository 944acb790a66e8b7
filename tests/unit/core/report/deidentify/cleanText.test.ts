import { describe, expect, it } from 'vitest';
import { identityFinder } from '../../../../../core/report/deidentify/cleanText.js';

const tells = identityFinder(['Li', 'Quill^Ann', 'PX-7', '山田', 'Žofie']);

describe('identityFinder', () => {
  it.each([
    'seen by LI, yes',
    'name Quill^Ann here',
    'px-7',
    '(山田)',
    'Z\u030cofie', // another composition of the same letters (UAX #15)
    'on 20250917',
    'on 2025-09-17T10:00',
  ])('finds identity in “%s”', (text) => expect(tells(text)).toBe(true));

  it.each(['limited', 'PX-77', 'Quill', '12345678', 'shift 0.02 mm', '2.25.2025091734'])(
    'finds none in “%s”',
    (text) => expect(tells(text)).toBe(false),
  );
});
