import { expect, test } from 'vitest';
import { parseArguments } from '../../../../app/loopback/parseArguments.js';

test('without words: a window, any port, no folder', () => {
  expect(parseArguments([])).toEqual({ ok: true, value: { window: true, port: 0, help: false } });
});

test('a folder, no window, a port', () => {
  expect(parseArguments(['scans', '--no-window', '--port', '8123'])).toEqual({
    ok: true,
    value: { folder: 'scans', window: false, port: 8123, help: false },
  });
});

test.each([[['a', 'b']], [['--unknown']], [['--port', 'x']], [['--port', '65536']], [['--port']]])(
  '%j is refused with the usage',
  (words) => {
    expect(parseArguments(words)).toMatchObject({
      ok: false,
      refusal: { code: 'usage', text: expect.stringContaining('Usage:') },
    });
  },
);
