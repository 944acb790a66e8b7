import { createHmac } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { hmacSha256 } from '../../../../../core/report/deidentify/hmacSha256.js';
import { digest } from '../sr/tellingNote.js';

describe('hmacSha256', () => {
  it('gives the published value', async () => {
    // RFC 4231, test case 2 (value from memory; the same from Node's crypto below).
    expect(await hmacSha256('Jefe', 'what do ya want for nothing?', digest)).toBe(
      '5bdcc146bf60754e6a042426089575c75a003f089d2739839dec58b964ec3843',
    );
  });

  it.each([0, 1, 63, 64, 65, 200])(
    'agrees with OpenSSL for a key of %d characters',
    async (size) => {
      const key = 'ß'.repeat(size);
      expect(await hmacSha256(key, '1.2.3', digest)).toBe(
        createHmac('sha256', key).update('1.2.3').digest('hex'),
      );
    },
  );
});
