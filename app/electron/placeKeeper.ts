import type { Rectangle, WindowPlace } from './windowPlace.js';

/** The parts of Electron's window that tell where it is. */
export interface PlacedWindow {
  getNormalBounds(): Rectangle;
  isMaximized(): boolean;
  isFullScreen(): boolean;
  isDestroyed(): boolean;
  on(event: PlaceEvent | 'close', listener: () => void): unknown;
}

const PLACE_EVENTS = [
  'resize',
  'move',
  'maximize',
  'unmaximize',
  'enter-full-screen',
  'leave-full-screen',
] as const;

type PlaceEvent = (typeof PLACE_EVENTS)[number];

/** Quiet time before a moved window is written, in ms: dragging fires many events a second. */
export const QUIET_MS = 500;

/**
 * Remembers where a window is: after each change once it has been quiet, and when it closes.
 *
 * @param displayOf the id of the display that shows most of these bounds
 * @param write keeps the place; its failure is its own to report
 */
export function keepPlace(
  window: PlacedWindow,
  displayOf: (bounds: Rectangle) => number,
  write: (place: WindowPlace) => void,
): void {
  let timer: NodeJS.Timeout | undefined;

  function writeNow(): void {
    clearTimeout(timer);
    timer = undefined;
    if (window.isDestroyed()) return;
    const bounds = wholePx(window.getNormalBounds());
    write({
      bounds,
      maximised: window.isMaximized(),
      fullScreen: window.isFullScreen(),
      displayId: displayOf(bounds),
    });
  }

  for (const event of PLACE_EVENTS) {
    window.on(event, () => {
      clearTimeout(timer);
      timer = setTimeout(writeNow, QUIET_MS);
    });
  }
  window.on('close', writeNow);
}

/** Some displays scale by fractions, and bounds come back with them. */
function wholePx({ x, y, width, height }: Rectangle): Rectangle {
  return {
    x: Math.round(x),
    y: Math.round(y),
    width: Math.round(width),
    height: Math.round(height),
  };
}
