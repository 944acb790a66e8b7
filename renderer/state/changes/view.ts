import type { VoiWindow } from '../../../core/dicom/index.js';
import type { Vec3 } from '../../../core/geometry/index.js';
import type { Kernel } from '../../../core/note/index.js';
import { followPosition } from '../../link/follow.js';
import { followCentre } from '../../link/followView.js';
import { nearestSlice } from '../../link/slicePosition.js';
import { gridCentre } from '../../plates/plateTransform.js';
import type { AppState, PlateSize, PlateState } from '../appState.js';
import { KERNELS, linksOf, otherKernel, plateGrid, stackOf } from '../selectors.js';
import type { Change } from '../store.js';

/** Bounds of the scale, CSS pixels per mm: from a tenth of a pixel to a hand's breadth for a millimetre. */
const SCALE_LIMITS = [0.1, 200] as const;

function withPlate(state: AppState, kernel: Kernel, part: Partial<PlateState>): AppState {
  return {
    ...state,
    plates: { ...state.plates, [kernel]: { ...state.plates[kernel], ...part } },
  };
}

/** Takes a plate to a position along its stack, mm, and the other one with it when scrolling is linked. */
export function scrollTo(kernel: Kernel, alongMm: number): Change {
  return (state) => {
    const moved = withPlate(state, kernel, { alongMm });
    const from = stackOf(state, kernel);
    const other = otherKernel(kernel);
    const to = stackOf(state, other);
    if (
      !linksOf(state).scroll ||
      state.pair === undefined ||
      from === undefined ||
      to === undefined
    ) {
      return moved;
    }
    const followed = followPosition(state.pair.link, from, alongMm, to);
    // Without a place that belongs to it the other plate goes beyond its stack, and says so.
    return withPlate(moved, other, { alongMm: followed ?? Number.POSITIVE_INFINITY });
  };
}

/** Goes a number of slices up or down from the shown one, stopping at the ends of the stack. */
export function scrollBy(kernel: Kernel, steps: number): Change {
  return (state) => {
    const stack = stackOf(state, kernel);
    if (stack === undefined) return state;
    const from = nearestSlice(stack.slices, state.plates[kernel].alongMm);
    const to = Math.min(Math.max(from + steps, 0), stack.slices.length - 1);
    const alongMm = stack.slices[to]?.alongMm;
    return alongMm === undefined || alongMm === state.plates[kernel].alongMm
      ? state
      : scrollTo(kernel, alongMm)(state);
  };
}

/** Sets a plate's window, and the other one's when windows are linked and both stacks are in the same unit. */
export function setWindow(kernel: Kernel, window: VoiWindow): Change {
  return (state) => {
    const set = withPlate(state, kernel, { window });
    const other = otherKernel(kernel);
    const sameUnit = stackOf(state, kernel)?.unit === stackOf(state, other)?.unit;
    return state.links.window && sameUnit ? withPlate(set, other, { window }) : set;
  };
}

/** Sets the middle and the scale of a plate, and of the other one when views are linked. */
export function setView(
  kernel: Kernel,
  centreMm: Vec3,
  scalePxPerMm: PlateState['scalePxPerMm'],
): Change {
  return (state) => {
    const bounded =
      scalePxPerMm === 'fit'
        ? scalePxPerMm
        : Math.min(Math.max(scalePxPerMm, SCALE_LIMITS[0]), SCALE_LIMITS[1]);
    const set = withPlate(state, kernel, { centreMm, scalePxPerMm: bounded });
    const other = otherKernel(kernel);
    const from = plateGrid(state, kernel);
    const to = plateGrid(state, other);
    if (
      !linksOf(state).view ||
      state.pair === undefined ||
      from === undefined ||
      to === undefined
    ) {
      return set;
    }
    return withPlate(set, other, {
      centreMm: followCentre(state.pair.link, from, centreMm, to),
      scalePxPerMm: bounded,
    });
  };
}

/** Shows the whole slice of a plate, and of the other one when views are linked. */
export function fitView(kernel: Kernel): Change {
  return (state) => {
    const grid = plateGrid(state, kernel);
    return grid === undefined ? state : setView(kernel, gridCentre(grid), 'fit')(state);
  };
}

/** Takes note of the size that a plate was laid out with. */
export function setPlateSize(kernel: Kernel, size: PlateSize): Change {
  return (state) => {
    const { widthPx, heightPx } = state.plates[kernel].size;
    return widthPx === size.widthPx && heightPx === size.heightPx
      ? state
      : withPlate(state, kernel, { size });
  };
}

/** Links or unlinks one thing; linking brings the other plate to where the active one is. */
export function toggleLink(which: keyof AppState['links']): Change {
  return (state) => {
    const on = !state.links[which];
    const linked = { ...state, links: { ...state.links, [which]: on } };
    if (!on) return linked;
    const plate = state.plates[state.active];
    if (which === 'scroll') return scrollTo(state.active, plate.alongMm)(linked);
    if (which === 'window') return setWindow(state.active, plate.window)(linked);
    return setView(state.active, plate.centreMm, plate.scalePxPerMm)(linked);
  };
}

/** Brings both plates to the middle slice of their stacks, whole, with the given windows. */
export function showPair(windows: { readonly [K in Kernel]: VoiWindow }): Change {
  return (state) => {
    const placed = KERNELS.reduce((so, kernel) => {
      const stack = stackOf(so, kernel);
      const middle = stack?.slices[Math.floor(stack.slices.length / 2)];
      if (middle === undefined) return so;
      return withPlate(so, kernel, {
        alongMm: middle.alongMm,
        window: windows[kernel],
        centreMm: gridCentre(middle.image.grid),
        scalePxPerMm: 'fit',
      });
    }, state);
    const soft = placed.plates.soft;
    return [scrollTo('soft', soft.alongMm), setWindow('soft', soft.window), fitView('soft')].reduce(
      (so, change) => change(so),
      placed,
    );
  };
}
