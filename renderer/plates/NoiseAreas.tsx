import { add, scale } from '../../core/geometry/index.js';
import type { Kernel } from '../../core/note/index.js';
import { noiseAreasOn } from '../state/noiseSelectors.js';
import { transformOf } from '../state/selectors.js';
import type { Store } from '../state/store.js';
import { patientToPlate } from './plateTransform.js';

/** The squares of this slice in which noise was measured. */
export function NoiseAreas({ kernel, store }: { readonly kernel: Kernel; readonly store: Store }) {
  const state = store.state.value;
  const transform = transformOf(state, kernel);
  if (transform === undefined) return null;
  const { grid, size } = transform;
  return (
    <svg class="plate-overlay" width={size.widthPx} height={size.heightPx} aria-hidden="true">
      {noiseAreasOn(state, kernel).map(({ centreMm, sizeMm }) => {
        const corner = (across: number, down: number): string => {
          const toSide = scale(grid.rowDirection, (across * sizeMm) / 2);
          const toEnd = scale(grid.columnDirection, (down * sizeMm) / 2);
          const { x, y } = patientToPlate(transform, add(centreMm, add(toSide, toEnd)));
          return `${x} ${y}`;
        };
        const path = `M${corner(-1, -1)}L${corner(1, -1)}L${corner(1, 1)}L${corner(-1, 1)}Z`;
        return (
          <g key={path} class="noise-area" data-chosen={centreMm === state.noiseArea}>
            <path class="region-halo" d={path} />
            <path class="noise-line" d={path} />
          </g>
        );
      })}
    </svg>
  );
}
