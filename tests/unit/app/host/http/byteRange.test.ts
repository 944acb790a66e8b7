import { expect, test } from 'vitest';
import { byteRange } from '../../../../../app/host/http/byteRange.js';

const part = (start: number, length: number) => ({ kind: 'part', span: { start, length } });

// RFC 9110 section 14.1.2 gives these for a representation of 10000 bytes.
test.each([
  ['bytes=0-499', part(0, 500)],
  ['bytes=500-999', part(500, 500)],
  ['bytes=-500', part(9500, 500)],
  ['bytes=9500-', part(9500, 500)],
])('%s of 10000 bytes', (header, expected) => {
  expect(byteRange(header, 10_000)).toEqual(expected);
});

// Same section: a last position beyond the end means the rest; a suffix longer than the whole means the whole.
test.each([
  ['bytes=9000-20000', part(9000, 1000)],
  ['bytes=-20000', part(0, 10_000)],
  ['bytes=10000-', { kind: 'unsatisfiable' }],
  ['bytes=-0', { kind: 'unsatisfiable' }],
])('%s at the bounds', (header, expected) => {
  expect(byteRange(header, 10_000)).toEqual(expected);
});

// Section 14.2: a server may ignore the field; an invalid one must be ignored.
test.each([undefined, '', 'bytes=-', 'bytes=5-2', 'bytes=a-b', 'lines=1-2', 'bytes=0-1,3-4'])(
  '%s counts as no range',
  (header) => {
    expect(byteRange(header, 10_000)).toEqual({ kind: 'whole' });
  },
);

test('an empty file has no part', () => {
  expect(byteRange('bytes=0-', 0)).toEqual({ kind: 'unsatisfiable' });
});
