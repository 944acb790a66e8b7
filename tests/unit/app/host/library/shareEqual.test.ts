import { expect, test } from 'vitest';
import { shareEqual } from '../../../../../app/host/library/shareEqual.js';

test('a value that equals the one before is the one before', () => {
  const before = { name: 'A', place: [1, 2, { deep: null }] };
  expect(shareEqual(before, structuredClone(before))).toBe(before);
});

test('what differs is kept, and what is in it that equals is shared', () => {
  const before = { number: 1, patient: { id: 'P' }, axes: [[1, 0], [0]] };
  const value = { number: 2, patient: { id: 'P' }, axes: [[1, 0], [5]], more: true };
  const shared = shareEqual(before, value);
  expect(shared).toEqual({ number: 2, patient: { id: 'P' }, axes: [[1, 0], [5]], more: true });
  expect(shared.patient).toBe(before.patient);
  expect(shared.axes[0]).toBe(before.axes[0]);
  expect(value.patient).not.toBe(before.patient);
});

test.each([
  [{ a: 1 }, { a: 1, b: undefined }],
  [{ a: 1, b: undefined }, { a: 1 }],
  [[1, 2], [1]],
  [{ 0: 1 }, [1]],
  [[1], { 0: 1 }],
  [null, {}],
  [{}, null],
  [0, -0],
  [undefined, 'text'],
] as const)('%j and %j are no equals', (before, value) => {
  const shared: unknown = shareEqual(before, value);
  expect(shared).toStrictEqual(value);
  expect(Object.is(shared, before)).toBe(false);
});
