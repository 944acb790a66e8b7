import { z } from 'zod';

const wholePx = z.number().int().min(-1_000_000).max(1_000_000);

/** A rectangle in device-independent pixels of the whole desktop. */
const rectangle = z
  .strictObject({
    x: wholePx,
    y: wholePx,
    width: wholePx.min(1),
    height: wholePx.min(1),
  })
  .readonly();

/** Where the window was when it was last seen. */
export const windowPlace = z
  .strictObject({
    /** Bounds of the window when it is neither maximised nor on the whole screen. */
    bounds: rectangle,
    maximised: z.boolean(),
    fullScreen: z.boolean(),
    displayId: z.number(),
  })
  .readonly();

export type WindowPlace = z.infer<typeof windowPlace>;
export type Rectangle = z.infer<typeof rectangle>;

/** A screen that is present now; its work area leaves out task bars and docks. */
export interface PresentDisplay {
  readonly id: number;
  readonly workArea: Rectangle;
}

/** Smallest window in which both plates and the hinge can be used, in px. */
export const SMALLEST = { width: 960, height: 620 } as const;
/** First window on a screen that has the room, in px. */
export const FIRST = { width: 1440, height: 900 } as const;

/**
 * The place for a new window: the remembered one moved and shrunk into the work area of the display
 * where it was; of the display that it overlaps most when that one is gone; of the primary display
 * when it overlaps none. Without a memory, centred on the primary display.
 */
export function placeWindow(
  remembered: WindowPlace | undefined,
  displays: readonly PresentDisplay[],
  primary: PresentDisplay,
): WindowPlace {
  if (remembered === undefined) {
    const { workArea } = primary;
    const width = Math.min(FIRST.width, workArea.width);
    const height = Math.min(FIRST.height, workArea.height);
    const bounds = {
      x: workArea.x + Math.floor((workArea.width - width) / 2),
      y: workArea.y + Math.floor((workArea.height - height) / 2),
      width,
      height,
    };
    return { bounds, maximised: false, fullScreen: false, displayId: primary.id };
  }
  const display =
    displays.find((present) => present.id === remembered.displayId) ??
    mostOverlapped(remembered.bounds, displays) ??
    primary;
  return {
    bounds: clampInto(remembered.bounds, display.workArea),
    maximised: remembered.maximised,
    fullScreen: remembered.fullScreen,
    displayId: display.id,
  };
}

/** Moves a rectangle wholly into an area, shrinking it only where the area is too small for it. */
export function clampInto(bounds: Rectangle, area: Rectangle): Rectangle {
  const width = Math.min(Math.max(bounds.width, SMALLEST.width), area.width);
  const height = Math.min(Math.max(bounds.height, SMALLEST.height), area.height);
  return {
    x: Math.min(Math.max(bounds.x, area.x), area.x + area.width - width),
    y: Math.min(Math.max(bounds.y, area.y), area.y + area.height - height),
    width,
    height,
  };
}

function mostOverlapped(
  bounds: Rectangle,
  displays: readonly PresentDisplay[],
): PresentDisplay | undefined {
  let best: PresentDisplay | undefined;
  let bestPx = 0;
  for (const display of displays) {
    const px = overlapPx(bounds, display.workArea);
    if (px > bestPx) {
      best = display;
      bestPx = px;
    }
  }
  return best;
}

function overlapPx(a: Rectangle, b: Rectangle): number {
  const width = Math.min(a.x + a.width, b.x + b.width) - Math.max(a.x, b.x);
  const height = Math.min(a.y + a.height, b.y + b.height) - Math.max(a.y, b.y);
  return Math.max(0, width) * Math.max(0, height);
}
