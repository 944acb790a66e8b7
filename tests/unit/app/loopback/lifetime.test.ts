import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import { createPresence } from '../../../../app/host/presence.js';
import { type EndReason, watchLifetime } from '../../../../app/loopback/lifetime.js';

beforeEach(() => {
  vi.useFakeTimers();
});
afterEach(() => {
  vi.useRealTimers();
});

function watched(window: boolean) {
  const presence = createPresence();
  const lifetime = watchLifetime(presence, { window });
  const reasons: EndReason[] = [];
  void lifetime.ended.then((reason) => reasons.push(reason));
  const pass = (ms: number) => vi.advanceTimersByTimeAsync(ms);
  return { presence, lifetime, reasons, pass };
}

test('a window whose page has not come for 60 s ends the program', async () => {
  const { pass, reasons } = watched(true);
  await pass(59_999);
  expect(reasons).toEqual([]);
  await pass(1);
  expect(reasons).toEqual(['no page came']);
});

test('the last page gone for 10 s ends the program; one that is loaded anew does not', async () => {
  const { pass, presence, reasons } = watched(true);
  const leave = presence.enter();
  await pass(600_000);
  leave();
  await pass(9_999);
  const leaveAgain = presence.enter();
  await pass(600_000);
  expect(reasons).toEqual([]);
  leaveAgain();
  await pass(10_000);
  expect(reasons).toEqual(['page gone']);
});

test('with a second page still open nothing ends', async () => {
  const { pass, presence, reasons } = watched(true);
  const leave = presence.enter();
  presence.enter();
  leave();
  leave();
  await pass(600_000);
  expect(reasons).toEqual([]);
});

test('without a window it serves until it is told to end', async () => {
  const { lifetime, pass, presence, reasons } = watched(false);
  presence.enter()();
  await pass(600_000);
  expect(reasons).toEqual([]);
  lifetime.end('signal');
  await pass(0);
  expect(reasons).toEqual(['signal']);
});

test('the first reason counts, and a window that failed leaves it serving', async () => {
  const ended = watched(true);
  ended.lifetime.end('window closed');
  ended.lifetime.end('signal');
  await ended.pass(600_000);
  expect(ended.reasons).toEqual(['window closed']);
  const serving = watched(true);
  serving.lifetime.serveOn();
  await serving.pass(600_000);
  expect(serving.reasons).toEqual([]);
});
