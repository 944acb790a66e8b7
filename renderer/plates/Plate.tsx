import { useEffect, useId, useMemo, useRef } from 'preact/hooks';
import type { Kernel } from '../../core/note/index.js';
import type { Fitting } from '../services/fitting.js';
import { goToRegion } from '../state/changes/goToRegion.js';
import { selectRegion } from '../state/changes/regions.js';
import {
  isInterpolated,
  kernelAt,
  kernelOfFace,
  type PlateFace,
} from '../state/compareSelectors.js';
import { shownRegions } from '../state/regionSelectors.js';
import { stackOf } from '../state/selectors.js';
import type { Change, Store } from '../state/store.js';
import type { ToolPointer } from '../tools/tool.js';
import type { ToolMachine } from '../tools/toolMachine.js';
import { zoomBy } from '../tools/zoomTool.js';
import type { Cuts } from '../volumes/cuts.js';
import { AlternateSwitch } from './AlternateSwitch.js';
import { DifferenceScale } from './DifferenceScale.js';
import { FoldEdge } from './FoldEdge.js';
import { layersOf, type Stored } from './layers.js';
import { NearEdges } from './NearEdges.js';
import { NoiseAreas } from './NoiseAreas.js';
import { PlateCanvas } from './PlateCanvas.js';
import { PlateLabels } from './PlateLabels.js';
import { PlateOverlay } from './PlateOverlay.js';
import { plateDescription, plateName } from './plateDescription.js';
import type { PlatePoint } from './platePoint.js';
import { Residuals } from './Residuals.js';

export interface PlateProps {
  /** One kernel, or both in one of the ways to compare. */
  readonly face: PlateFace;
  readonly store: Store;
  readonly machine: ToolMachine;
  readonly stored: Stored;
  /** Cuts oblique planes, to go to what lies on one. */
  readonly cuts: Pick<Cuts, 'of'>;
  /** What was fitted for a stent, for the picture of what is left over. */
  readonly fitOf: Fitting['fitOf'];
  /** Goes a number of slices up or down. */
  readonly scroll: (kernel: Kernel, steps: number) => Change;
  /** A key went down on the plate; true when it was used. */
  readonly onKey: (kernel: Kernel, event: KeyboardEvent) => boolean;
}

/** A turn of the wheel by this many CSS pixels is one slice. */
const PIXELS_PER_SLICE = 60;
/** A turn of the wheel by this many CSS pixels makes the image e times larger. */
const PIXELS_PER_E = 500;
const PIXELS_PER_LINE = 20;

/** One of the two images, or both in one place, with its marks, its words, its pointer tools and its keys. */
export function Plate({ face, store, machine, stored, cuts, fitOf, scroll, onKey }: PlateProps) {
  const surface = useRef<HTMLDivElement>(null);
  const describedBy = useId();
  const layers = useMemo(() => layersOf(face, stored), [face, stored]);
  useWheel(surface, face, store, scroll);

  const pointerOf = (event: PointerEvent): ToolPointer => {
    const point = placeOf(event);
    return {
      kernel: kernelAt(store.now(), face, point.x),
      point,
      shift: event.shiftKey,
      alt: event.altKey,
    };
  };
  const hover = (point: PlatePoint | undefined): void => {
    store.change('Hover', (now) => ({
      ...now,
      hover: point && { kernel: kernelAt(now, face, point.x), point },
    }));
  };
  const state = store.state.value;
  const kernel = kernelOfFace(state, face);
  const regions = shownRegions(state);
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: keys bubble up from the image and from its list of regions
    <div
      class="plate"
      onKeyDown={(event) => {
        if (onKey(kernelOfFace(store.now(), face), event)) {
          event.preventDefault();
          event.stopPropagation();
        }
      }}
      onFocusIn={() =>
        store.change('Plate chosen', (now) => ({ ...now, active: kernelOfFace(now, face) }))
      }
    >
      <div
        class="plate-surface"
        ref={surface}
        data-plate={face}
        data-tool={state.tool}
        role="application"
        aria-label={plateName(state, face)}
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
        {layers.map((layer) => (
          <PlateCanvas
            key={layer.name}
            layer={layer}
            store={store}
            cut={face === 'fold' && layer.name === 'sharp' ? state.compare.foldAt : 0}
            hidden={face === 'alternate' && layer.name !== kernel}
          />
        ))}
        {state.noiseAreas && state.cut === undefined && (
          <NoiseAreas kernel={kernel} store={store} />
        )}
        <NearEdges kernel={kernel} store={store} stored={stored} />
        <Residuals kernel={kernel} store={store} fitOf={fitOf} />
        <PlateOverlay kernel={kernel} store={store} />
        <PlateLabels face={face} store={store} />
        {layers.map((layer) => {
          const content = layer.contentOf(state, 1);
          if (content.kind === 'slice' || content.text === '') return null;
          if (face === 'alternate' && layer.name !== kernel) return null;
          return (
            <p key={layer.name} class="plate-words" data-face={face} data-layer={layer.name}>
              {content.text}
            </p>
          );
        })}
        {face === 'fold' && <FoldEdge at={state.compare.foldAt} store={store} />}
        {face === 'alternate' && (
          <AlternateSwitch
            shown={kernel}
            resting={state.compare.resting}
            letterKeys={state.settings.letterKeys}
            store={store}
          />
        )}
        {face === 'difference' && (
          <DifferenceScale
            rangeHu={state.compare.rangeHu}
            interpolated={isInterpolated(state)}
            store={store}
          />
        )}
      </div>
      <p id={describedBy} class="visually-hidden">
        {plateDescription(state, face)}
      </p>
      {stackOf(state, kernel) !== undefined && regions.length > 0 && (
        <ul
          class="visually-hidden"
          aria-label={
            face === 'soft' || face === 'sharp'
              ? `Regions on the ${face} plate`
              : 'Regions on the plate'
          }
        >
          {regions.map(({ id, label, place }) => (
            <li key={id}>
              <button
                type="button"
                aria-pressed={id === state.selected}
                onFocus={() => {
                  store.change('Select region', selectRegion(id));
                  store.change('Go to region', goToRegion(cuts));
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
  face: PlateFace,
  store: Store,
  scroll: PlateProps['scroll'],
): void {
  useEffect(() => {
    const element = surface.current;
    if (element === null) return;
    let turnedPx = 0;
    const onWheel = (event: WheelEvent): void => {
      event.preventDefault();
      const kernel = kernelOfFace(store.now(), face);
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
      store.change('Scroll', scroll(kernel, -steps));
    };
    element.addEventListener('wheel', onWheel, { passive: false });
    return () => element.removeEventListener('wheel', onWheel);
  }, [surface, face, store, scroll]);
}
