import { add, subtract } from '../../core/geometry/index.js';
import type { NoteStent } from '../../core/note/index.js';
import { patientToPlate, plateToPatient } from '../plates/plateTransform.js';
import type { AppState } from '../state/appState.js';
import { transformOf } from '../state/selectors.js';
import { stentCircle, stentsOn } from '../state/stentSelectors.js';
import type { Tool, ToolPointer } from './tool.js';

const EDGE_PX = 5;

/** The stent whose circle or centre a press takes hold of. */
export function stentAt(
  state: AppState,
  { kernel, point }: Pick<ToolPointer, 'kernel' | 'point'>,
): NoteStent | undefined {
  const transform = transformOf(state, kernel);
  if (transform === undefined) return undefined;
  return stentsOn(state, kernel).find((stent) => {
    const circle = stentCircle(state, kernel, stent);
    if (circle === undefined) return false;
    const centre = patientToPlate(transform, circle.centreMm);
    const edge = patientToPlate(transform, add(circle.centreMm, scaled(circle)));
    const radiusPx = Math.hypot(edge.x - centre.x, edge.y - centre.y);
    const awayPx = Math.hypot(point.x - centre.x, point.y - centre.y);
    return awayPx <= EDGE_PX || Math.abs(awayPx - radiusPx) <= EDGE_PX;
  });
}

function scaled({ u, radiiMm }: NonNullable<ReturnType<typeof stentCircle>>) {
  const [x, y, z] = u ?? [1, 0, 0];
  const [radiusMm] = radiiMm;
  return [x * radiusMm, y * radiusMm, z * radiusMm] as const;
}

/** Selects a stent, or moves the place from which it is fitted. */
export function stentHandleTool(stent: NoteStent): Tool {
  return {
    id: 'stent-handle',
    click: (port, { kernel }) =>
      port.change('Select stent', (state) => ({ ...state, active: kernel, selected: stent.id })),
    drag: (port, start) => {
      const { kernel } = start;
      const transform = transformOf(port.now(), kernel);
      if (transform === undefined) return undefined;
      const from = plateToPatient(transform, start.point);
      const begin = stent.fit?.axisMm ?? stent.centreMm;
      return {
        move: () =>
          port.change('Select stent', (state) => ({
            ...state,
            active: kernel,
            selected: stent.id,
          })),
        complete: ({ point }) => {
          const by = subtract(plateToPatient(transform, point), from);
          port.moveStent(stent.id, add(begin, by));
        },
        cancel: () => {},
      };
    },
  };
}
