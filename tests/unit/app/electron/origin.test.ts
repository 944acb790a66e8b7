import { describe, expect, it } from 'vitest';
import { isOwnUrl } from '../../../../app/electron/origin.js';

describe('isOwnUrl', () => {
  it.each(['app://local', 'app://local/', 'app://local/api/session?x=1#y', 'APP://local/'])(
    'takes %s',
    (address) => expect(isOwnUrl(address)).toBe(true),
  );

  it.each([
    '',
    'null',
    'about:blank',
    'app://local.example/',
    'app://localhost/',
    'app://local:81/',
    'app://user@local/',
    'app:///local/',
    'https://local/',
    'file:///local',
    'blob:app://local/1',
    'data:text/html,app://local/',
  ])('refuses %j', (address) => expect(isOwnUrl(address)).toBe(false));
});
