import { formatFixed } from '../../core/format/index.js';
import type { NotePlane } from '../../core/note/index.js';
import { parseMm } from './parts/parseMm.js';
import { TextField } from './parts/TextField.js';

export interface PlaneTabsProps {
  readonly planes: readonly NotePlane[];
  /** Identifier of the plane that is shown; undefined while slices are. */
  readonly shown: string | undefined;
  readonly frozen: boolean;
  /** True while slices that the cut needs are still to come. */
  readonly partial: boolean;
  readonly onShow: (planeId: string | undefined) => void;
  /** Thickness to average over, mm; undefined for none. */
  readonly onSlab: (slabMm: number | undefined) => void;
  readonly onInterpolation: (interpolation: 'linear' | 'cubic') => void;
  readonly onDelete: () => void;
}

/** Chooses between the slices and the oblique cuts, and says how the one that is shown was made. */
export function PlaneTabs(props: PlaneTabsProps) {
  const { planes, shown, frozen } = props;
  const plane = planes.find(({ id }) => id === shown);
  return (
    <section class="plane-tabs" aria-label="Slices and oblique cuts">
      {/* biome-ignore lint/a11y/useSemanticElements: a fieldset is for forms; these choose a view */}
      <div class="plane-choice" role="group" aria-label="Show">
        <button
          type="button"
          class="button"
          aria-pressed={shown === undefined}
          onClick={() => props.onShow(undefined)}
        >
          Slices
        </button>
        {planes.map(({ id, label }) => (
          <button
            key={id}
            type="button"
            class="button"
            aria-pressed={id === shown}
            onClick={() => props.onShow(id)}
          >
            {label}
          </button>
        ))}
        {plane !== undefined && (
          <button
            type="button"
            class="button delete"
            disabled={frozen}
            title={`Delete ${plane.label}, where nothing is measured on it`}
            onClick={props.onDelete}
          >
            Delete
          </button>
        )}
      </div>
      {plane !== undefined && (
        <>
          <p class="resampled">
            {`Oblique, ${formatFixed(plane.angleDeg, 0)}° to the slices. Resampled: ${plane.resampling}.${props.partial ? ' Slices are still being read…' : ''}`}
          </p>
          <div class="plane-fields">
            {/* biome-ignore lint/a11y/noLabelWithoutControl: the field is inside */}
            <label title="Thickness across the plane that is averaged over, mm; empty for none.">
              Slab
              <TextField
                bare
                numeric
                look="slab"
                label="Thickness of the slab in mm"
                placeholder="none"
                value={plane.slabMm === undefined ? '' : formatFixed(plane.slabMm, 1)}
                disabled={frozen}
                onCommit={(text) => {
                  const typed = parseMm(text);
                  if (typed !== undefined) props.onSlab(typed ?? undefined);
                }}
              />
              mm
            </label>
            <select
              class="field"
              aria-label="Interpolation"
              value={plane.interpolation ?? 'cubic'}
              disabled={frozen}
              onChange={({ currentTarget }) =>
                props.onInterpolation(currentTarget.value === 'linear' ? 'linear' : 'cubic')
              }
            >
              <option value="cubic">cubic</option>
              <option value="linear">trilinear</option>
            </select>
          </div>
        </>
      )}
    </section>
  );
}
