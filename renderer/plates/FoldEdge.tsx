import { setFold } from '../state/changes/compare.js';
import type { Store } from '../state/store.js';

const STEP = 0.01;
const FAST_STEP = 0.1;

/** The movable edge of a folded plate: soft left of it, sharp right of it. Dragged, or moved by the arrow keys. */
export function FoldEdge({ at, store }: { readonly at: number; readonly store: Store }) {
  const move = (to: number): void => store.change('Move the fold', setFold(to));
  const onPointerDown = (event: PointerEvent): void => {
    // The plate's own tools must not take this press for theirs.
    event.stopPropagation();
    if (event.button !== 0 || !(event.currentTarget instanceof HTMLElement)) return;
    event.currentTarget.setPointerCapture(event.pointerId);
  };
  const onPointerMove = (event: PointerEvent): void => {
    if (!(event.currentTarget instanceof HTMLElement)) return;
    if (!event.currentTarget.hasPointerCapture(event.pointerId)) return;
    event.stopPropagation();
    const plate = event.currentTarget.parentElement?.getBoundingClientRect();
    if (plate !== undefined) move((event.clientX - plate.left) / plate.width);
  };
  const onKeyDown = (event: KeyboardEvent): void => {
    const to = edgeForKey(event, at);
    if (to === undefined) return;
    event.preventDefault();
    event.stopPropagation();
    move(to);
  };
  const percent = Math.round(at * 100);
  return (
    // biome-ignore lint/a11y/useSemanticElements: a movable separator is no thematic break
    <div
      class="fold-edge"
      role="separator"
      aria-orientation="vertical"
      aria-label="Edge between soft and sharp"
      aria-valuenow={percent}
      aria-valuemin={0}
      aria-valuemax={100}
      aria-valuetext={`soft on the left ${percent} % of the plate`}
      tabIndex={0}
      style={{ left: `${at * 100}%` }}
      onPointerDown={onPointerDown}
      onPointerMove={onPointerMove}
      onPointerUp={(event) => event.stopPropagation()}
      onKeyDown={onKeyDown}
      onDblClick={() => move(0.5)}
    >
      <span class="grip" aria-hidden="true" />
    </div>
  );
}

function edgeForKey({ key, shiftKey }: KeyboardEvent, at: number): number | undefined {
  const step = shiftKey ? FAST_STEP : STEP;
  switch (key) {
    case 'ArrowLeft':
      return at - step;
    case 'ArrowRight':
      return at + step;
    case 'Home':
      return 0;
    case 'End':
      return 1;
    default:
      return undefined;
  }
}
