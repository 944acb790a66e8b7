import { useCallback, useEffect, useId, useRef } from 'preact/hooks';
import type { Kernel } from '../../core/note/index.js';
import { goToRegion } from '../state/changes/goToRegion.js';
import { selectRegion } from '../state/changes/regions.js';
import { scrollBy } from '../state/changes/view.js';
import { stackOf } from '../state/selectors.js';
import type { Store } from '../state/store.js';
import type { ToolPointer } from '../tools/tool.js';
import type { ToolMachine } from '../tools/toolMachine.js';
import { zoomBy } from '../tools/zoomTool.js';
import type { StoredSlice } from '../volumes/volume.js';
import { PlateCanvas } from './PlateCanvas.js';
import { PlateLabels } from './PlateLabels.js';
import { PlateOverlay } from './PlateOverlay.js';
import { plateContent } from './plateContent.js';
import { plateDescription, plateName } from './plateDescription.js';
import type { PlatePoint } from './platePoint.js';

export interface PlateProps {
  readonly kernel: Kernel;
  readonly store: Store;
  readonly machine: ToolMachine;
  readonly stored: (kernel: Kernel, index: number) => StoredSlice | undefined;
  /** A key went down on the plate; true when it was used. */
  readonly onKey: (kernel: Kernel, event: KeyboardEvent) => boolean;
}

/** A turn of the wheel by this many CSS pixels is one slice. */
const PIXELS_PER_SLICE = 60;
/** A turn of the wheel by this many CSS pixels makes the image e times larger. */
const PIXELS_PER_E = 500;
const PIXELS_PER_LINE = 20;

/** One of the two images, with its marks, its words, its pointer tools and its keys. */
export function Plate({ kernel, store, machine, stored, onKey }: PlateProps) {
  const surface = useRef<HTMLDivElement>(null);
  const describedBy = useId();
  const storedHere = useCallback((index: number) => stored(kernel, index), [kernel, stored]);
  useWheel(surface, kernel, store);

  const pointerOf = (event: PointerEvent): ToolPointer => ({
    kernel,
    point: placeOf(event),
    shift: event.shiftKey,
    alt: event.altKey,
  });
  const hover = (point: PlatePoint | undefined): void => {
    store.change('Hover', (now) => ({ ...now, hover: point && { kernel, point } }));
  };
  const state = store.state.value;
  const content = plateContent(state, kernel, storedHere, 1);
  const regions = state.note?.regions ?? [];
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: keys bubble up from the image and from its list of regions
    <div
      class="plate"
      onKeyDown={(event) => {
        if (onKey(kernel, event)) {
          event.preventDefault();
          event.stopPropagation();
        }
      }}
      onFocusIn={() => store.change('Plate chosen', (now) => ({ ...now, active: kernel }))}
    >
      <div
        class="plate-surface"
        ref={surface}
        data-plate={kernel}
        data-tool={state.tool}
        role="application"
        aria-label={plateName(state, kernel)}
        aria-describedby={describedBy}
        // biome-ignore lint/a11y/noNoninteractiveTabindex: the arrow keys work on the image
        tabIndex={0}
        onPointerDown={(event) => {
          if (event.button !== 0 || !(event.currentTarget instanceof HTMLElement)) return;
          event.currentTarget.setPointerCapture(event.pointerId);
          event.currentTarget.focus({ preventScroll: true });
          machine.down(pointerOf(event));
        }}
        onPointerMove={(event) => {
          hover(placeOf(event));
          machine.move(pointerOf(event));
        }}
        onPointerUp={(event) => {
          if (event.button === 0) machine.up(pointerOf(event));
        }}
        onPointerCancel={() => machine.interrupt()}
        onLostPointerCapture={() => machine.interrupt()}
        onPointerLeave={() => hover(undefined)}
      >
        <PlateCanvas kernel={kernel} store={store} stored={storedHere} />
        <PlateOverlay kernel={kernel} store={store} />
        <PlateLabels kernel={kernel} store={store} />
        {content.kind === 'words' && content.text !== '' && (
          <p class="plate-words">{content.text}</p>
        )}
      </div>
      <p id={describedBy} class="visually-hidden">
        {plateDescription(state, kernel)}
      </p>
      {stackOf(state, kernel) !== undefined && regions.length > 0 && (
        <ul class="visually-hidden" aria-label={`Regions on the ${kernel} plate`}>
          {regions.map(({ id, label, place }) => (
            <li key={id}>
              <button
                type="button"
                aria-pressed={id === state.selected}
                onFocus={() => {
                  store.change('Select region', selectRegion(id));
                  store.change('Go to region', goToRegion);
                }}
              >
                {place === '' ? label : `${label}, ${place}`}
              </button>
            </li>
          ))}
        </ul>
      )}
    </div>
  );
}

/** The place of a pointer on the plate, CSS pixels. */
function placeOf(event: MouseEvent): PlatePoint {
  if (!(event.currentTarget instanceof Element)) return { x: event.offsetX, y: event.offsetY };
  const { left, top } = event.currentTarget.getBoundingClientRect();
  return { x: event.clientX - left, y: event.clientY - top };
}

/** The wheel goes through the slices, with Ctrl it zooms. It must not be passive: the page would zoom with it. */
function useWheel(
  surface: { readonly current: HTMLDivElement | null },
  kernel: Kernel,
  store: Store,
): void {
  useEffect(() => {
    const element = surface.current;
    if (element === null) return;
    let turnedPx = 0;
    const onWheel = (event: WheelEvent): void => {
      event.preventDefault();
      const isLines = event.deltaMode === WheelEvent.DOM_DELTA_LINE;
      const deltaPx = event.deltaY * (isLines ? PIXELS_PER_LINE : 1);
      if (event.ctrlKey || event.metaKey) {
        const { left, top } = element.getBoundingClientRect();
        const anchor = { x: event.clientX - left, y: event.clientY - top };
        store.change('Zoom', zoomBy(kernel, Math.exp(-deltaPx / PIXELS_PER_E), anchor));
        return;
      }
      // What is left of a turn is kept, so that the small steps of a touch pad add up; a new direction begins anew.
      turnedPx = Math.sign(turnedPx) === -Math.sign(deltaPx) ? deltaPx : turnedPx + deltaPx;
      const isNotch = Math.abs(deltaPx) >= PIXELS_PER_SLICE;
      const steps = isNotch ? Math.sign(deltaPx) : Math.trunc(turnedPx / PIXELS_PER_SLICE);
      if (steps === 0) return;
      turnedPx = isNotch ? 0 : turnedPx - steps * PIXELS_PER_SLICE;
      // Turning the wheel towards oneself goes down the body, to smaller positions.
      store.change('Scroll', scrollBy(kernel, -steps));
    };
    element.addEventListener('wheel', onWheel, { passive: false });
    return () => element.removeEventListener('wheel', onWheel);
  }, [surface, kernel, store]);
}
