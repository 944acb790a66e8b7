import type { Kernel } from '../../core/note/index.js';
import { isOnPlate, regionsOn, takesMarks } from '../state/regionSelectors.js';
import { shownSlice, transformOf } from '../state/selectors.js';
import type { Store } from '../state/store.js';
import { shapeOnPlate } from '../tools/regionOnPlate.js';
import { CourseMarks } from './CourseMarks.js';
import { LineMarks } from './LineMarks.js';
import { patientToPlate } from './plateTransform.js';
import { RegionShape } from './RegionShape.js';
import { StentMarks } from './StentMarks.js';

export interface PlateOverlayProps {
  readonly kernel: Kernel;
  readonly store: Store;
}

const CARET_PX = 9;

/** Regions, the one being drawn, and the crosshair, over a plate's picture. */
export function PlateOverlay({ kernel, store }: PlateOverlayProps) {
  const state = store.state.value;
  const transform = transformOf(state, kernel);
  if (transform === undefined || shownSlice(state, kernel) === undefined) return null;
  const { draft, openOutline, caret } = state;
  const regions = regionsOn(state, kernel).filter(({ id }) => id !== draft?.regionId);
  const isDrafted = draft !== undefined && isOnPlate(state, kernel, draft.shape);
  // While a shape is chosen the arrows move it and not the crosshair.
  const isCaretFree = draft === undefined && state.selected === undefined;
  const isCaretHere =
    isCaretFree && caret !== undefined && (caret.kernel === kernel || takesMarks(state, kernel));
  const at = isCaretHere ? patientToPlate(transform, caret.pointMm) : undefined;
  const { widthPx, heightPx } = transform.size;
  return (
    <svg class="plate-overlay" width={widthPx} height={heightPx} aria-hidden="true">
      {regions.map((region) => (
        <RegionShape
          key={region.id}
          shape={shapeOnPlate(region.shape, transform)}
          role={region.role}
          selected={region.id === state.selected}
        />
      ))}
      {isDrafted && (
        <RegionShape shape={shapeOnPlate(draft.shape, transform)} role={draft.role} selected />
      )}
      {openOutline !== undefined && takesMarks(state, kernel) && (
        <RegionShape
          shape={shapeOnPlate({ kind: 'outline', pointsMm: openOutline.pointsMm }, transform)}
          role={openOutline.role}
          selected
          open
        />
      )}
      <CourseMarks kernel={kernel} store={store} />
      <StentMarks kernel={kernel} store={store} />
      <LineMarks kernel={kernel} store={store} />
      {at !== undefined && (
        <path
          class="caret"
          data-active={caret?.kernel === kernel}
          d={`M${at.x - CARET_PX} ${at.y}h6m6 0h6M${at.x} ${at.y - CARET_PX}v6m0 6v6`}
        />
      )}
    </svg>
  );
}
