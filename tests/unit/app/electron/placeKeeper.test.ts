import { EventEmitter } from 'node:events';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { keepPlace, type PlacedWindow } from '../../../../app/electron/placeKeeper.js';
import type { WindowPlace } from '../../../../app/electron/windowPlace.js';

beforeEach(() => void vi.useFakeTimers());
afterEach(() => void vi.useRealTimers());

function kept() {
  const written: WindowPlace[] = [];
  const now = { x: 10, y: 20, maximised: false, fullScreen: false, destroyed: false };
  const window = Object.assign(new EventEmitter(), {
    getNormalBounds: () => ({ x: now.x, y: now.y, width: 1200, height: 800 }),
    isMaximized: () => now.maximised,
    isFullScreen: () => now.fullScreen,
    isDestroyed: () => now.destroyed,
  });
  keepPlace(
    window as unknown as PlacedWindow,
    (bounds) => (bounds.x < 1920 ? 1 : 2),
    (place) => written.push(place),
  );
  return { window, now, written };
}

describe('keepPlace', () => {
  it('writes once after many moves, when it has been quiet for half a second', () => {
    const { window, now, written } = kept();
    for (let step = 0; step < 20; step += 1) {
      now.x = 2000 + step;
      window.emit('move');
      vi.advanceTimersByTime(499);
    }
    expect(written).toEqual([]);
    vi.advanceTimersByTime(1);
    expect(written).toEqual([
      {
        bounds: { x: 2019, y: 20, width: 1200, height: 800 },
        maximised: false,
        fullScreen: false,
        displayId: 2,
      },
    ]);
  });

  it.each(['resize', 'move', 'maximize', 'unmaximize', 'enter-full-screen', 'leave-full-screen'])(
    'writes after %s',
    (event) => {
      const { window, written } = kept();
      window.emit(event);
      vi.advanceTimersByTime(500);
      expect(written).toHaveLength(1);
    },
  );

  it('keeps the normal bounds of a maximised window', () => {
    const { window, now, written } = kept();
    now.maximised = true;
    window.emit('maximize');
    vi.advanceTimersByTime(500);
    expect(written[0]).toMatchObject({ maximised: true, bounds: { width: 1200, height: 800 } });
  });

  it('writes at once on closing, and not again later', () => {
    const { window, now, written } = kept();
    window.emit('move');
    window.emit('close');
    expect(written).toHaveLength(1);
    now.destroyed = true;
    vi.advanceTimersByTime(5000);
    expect(written).toHaveLength(1);
  });

  it('asks a destroyed window nothing', () => {
    const { window, now, written } = kept();
    window.emit('move');
    now.destroyed = true;
    vi.advanceTimersByTime(500);
    expect(written).toEqual([]);
  });
});
