import type { Vec3 } from '../../core/geometry/index.js';
import type { Kernel } from '../../core/note/index.js';
import type { Outline } from '../../core/region/index.js';
import type { PlatePoint } from '../plates/platePoint.js';
import { patientToPlate, plateToPatient } from '../plates/plateTransform.js';
import type { AppState, OpenOutline } from '../state/appState.js';
import { transformOf } from '../state/selectors.js';
import { canMark } from './canMark.js';
import { CLOSING_PX, thinned } from './outlinePoints.js';
import type { Tool, ToolPort } from './tool.js';

/**
 * Draws an outline: a drag traces it and closes it at the release; clicks set its points one by one, and a
 * click on the first one, or Enter, closes it.
 */
export const outlineTool: Tool = {
  id: 'outline',
  click: (port, start) => {
    const open = port.now().openOutline;
    const isClosing =
      open !== undefined &&
      open.kernel === start.kernel &&
      isNearFirst(port.now(), open, start.point);
    const transform = transformOf(port.now(), start.kernel);
    if (isClosing) closeOutline(port);
    else if (transform !== undefined && canMark(port, start.kernel)) {
      setPoint(port, start.kernel, plateToPatient(transform, start.point));
    }
  },
  drag: (port, start) => {
    const before = port.now();
    const { kernel } = start;
    const transform = transformOf(before, kernel);
    if (transform === undefined || !canMark(port, kernel)) return undefined;
    const traced: PlatePoint[] = [start.point];
    const outline = (): Outline => ({
      kind: 'outline',
      pointsMm: thinned(traced).map((point) => plateToPatient(transform, point)),
    });
    const giveUp = (): void => {
      port.change('Give the outline up', (state) => ({
        ...state,
        draft: undefined,
        selected: before.selected,
        openOutline: before.openOutline,
      }));
    };
    return {
      move: ({ point }) => {
        const last = traced.at(-1);
        if (last !== undefined && last.x === point.x && last.y === point.y) return;
        traced.push(point);
        port.change('Trace outline', (state) => ({
          ...state,
          active: kernel,
          selected: undefined,
          openOutline: undefined,
          draft: { kernel, role: state.role, shape: outline(), regionId: undefined },
        }));
      },
      complete: () => {
        const shape = outline();
        if (shape.pointsMm.length >= 3) port.placeRegion(port.now().role, shape);
        else giveUp();
      },
      cancel: giveUp,
    };
  },
};

/** Adds a point to the outline that is being set, or begins one. */
export function setPoint(port: ToolPort, kernel: Kernel, pointMm: Vec3): void {
  port.change('Set outline point', (state) => {
    const open = state.openOutline;
    const pointsMm = open?.kernel === kernel ? [...open.pointsMm, pointMm] : [pointMm];
    return {
      ...state,
      active: kernel,
      selected: undefined,
      openOutline: { kernel, role: state.role, pointsMm },
      caret: { kernel, pointMm },
    };
  });
}

/** Closes the outline that is being set; with fewer than three points it says what is missing. */
export function closeOutline(port: ToolPort): void {
  const open = port.now().openOutline;
  if (open === undefined) return;
  if (open.pointsMm.length < 3) {
    port.change('Outline too short', (state) => ({
      ...state,
      message: { tone: 'warning', text: 'An outline needs three points. Set another one.' },
    }));
    return;
  }
  port.placeRegion(open.role, { kind: 'outline', pointsMm: open.pointsMm });
}

/** Takes the last point of the outline back. */
export function removePoint(state: AppState): AppState {
  const open = state.openOutline;
  if (open === undefined) return state;
  const pointsMm = open.pointsMm.slice(0, -1);
  return { ...state, openOutline: pointsMm.length === 0 ? undefined : { ...open, pointsMm } };
}

function isNearFirst(state: AppState, open: OpenOutline, point: PlatePoint): boolean {
  const transform = transformOf(state, open.kernel);
  const [first] = open.pointsMm;
  if (transform === undefined || first === undefined || open.pointsMm.length < 3) return false;
  const at = patientToPlate(transform, first);
  return Math.hypot(at.x - point.x, at.y - point.y) <= CLOSING_PX;
}
