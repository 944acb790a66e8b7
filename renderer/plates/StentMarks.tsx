import type { Kernel } from '../../core/note/index.js';
import { transformOf } from '../state/selectors.js';
import { stentCircle, stentsOn } from '../state/stentSelectors.js';
import type { Store } from '../state/store.js';
import { shapeOnPlate } from '../tools/regionOnPlate.js';
import { patientToPlate } from './plateTransform.js';

const CROSS_PX = 4;

/** The stents on what a plate shows: the circle of the struts where one was fitted, dashed where none was, and the axis. */
export function StentMarks({ kernel, store }: { readonly kernel: Kernel; readonly store: Store }) {
  const state = store.state.value;
  const transform = transformOf(state, kernel);
  if (transform === undefined) return null;
  return (
    <g>
      {stentsOn(state, kernel).map((stent) => {
        const circle = stentCircle(state, kernel, stent);
        const shape = circle && shapeOnPlate(circle, transform);
        if (circle === undefined || shape?.kind !== 'ellipse') return null;
        const { x, y } = patientToPlate(transform, circle.centreMm);
        const [rx, ry] = [Math.hypot(shape.u.x, shape.u.y), Math.hypot(shape.v.x, shape.v.y)];
        const isFitted = stent.fit !== null && stent.fit.reason === null;
        return (
          <g
            key={stent.id}
            class="stent-mark"
            data-stent={stent.id}
            data-fitted={isFitted}
            data-selected={stent.id === state.selected}
          >
            <ellipse class="region-halo" cx={x} cy={y} rx={rx} ry={ry} />
            <ellipse class="stent-ring" cx={x} cy={y} rx={rx} ry={ry} />
            <path
              class="stent-axis"
              d={`M${x - CROSS_PX} ${y}h${2 * CROSS_PX}M${x} ${y - CROSS_PX}v${2 * CROSS_PX}`}
            />
            <text x={x + rx + 5} y={y - ry}>
              {stent.id}
            </text>
          </g>
        );
      })}
    </g>
  );
}
