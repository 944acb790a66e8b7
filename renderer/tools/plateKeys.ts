import {
  add,
  patientToPixel,
  pixelToPatient,
  type SliceGrid,
  scale,
  type Vec3,
} from '../../core/geometry/index.js';
import type { Kernel } from '../../core/note/index.js';
import { growShape, moveShape, type Shape, shapeCentre } from '../../core/region/index.js';
import type { AppState } from '../state/appState.js';
import { scrollTo } from '../state/changes/view.js';
import { isOnPlate, selectedRegion } from '../state/regionSelectors.js';
import { plateGrid, stackOf } from '../state/selectors.js';
import { canMark } from './canMark.js';
import { setCoursePoint } from './cutTool.js';
import { ellipseOn } from './drawnEllipse.js';
import { type LineKey, lineKey } from './lineKeys.js';
import { closeOutline, removePoint, setPoint } from './outlineTool.js';
import { moveSelectedStent } from './stentKeys.js';
import { fitStentAt } from './stentTool.js';
import type { ToolPort } from './tool.js';

/** Radius of an ellipse that is placed by key, mm; plus and minus change it. */
const FIRST_RADIUS_MM = 1.5;
const FAST = 10;

const ARROWS: Readonly<Record<string, readonly [number, number]>> = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowUp: [0, -1],
  ArrowDown: [0, 1],
};

export interface PlateKey {
  readonly key: string;
  readonly shift: boolean;
  readonly letterKeys: boolean;
}

/**
 * The keys of a plate: everything that the pointer does there. True when the key was used.
 * Arrows move the shape being placed, else the selected region, else the crosshair; + and − change the size of the
 * same; Enter places and accepts; Backspace takes an outline's last point back; Home and End go to the ends.
 */
export function plateKey(
  port: ToolPort,
  kernel: Kernel,
  { key, shift, letterKeys }: PlateKey,
): boolean {
  const state = port.now();
  const grid = plateGrid(state, kernel);
  if (grid === undefined) return false;
  const asked = lineKeyOf(key, shift, letterKeys, grid, caretPoint(state, kernel));
  if (asked !== undefined && lineKey(port, kernel, asked)) return true;
  const arrow = ARROWS[key];
  if (arrow !== undefined) {
    const by = arrowMm(arrow, shift, grid);
    changeShape(port, kernel, 'move', (shape) => moveShape(shape, by)) ||
      moveSelectedStent(port, kernel, by) ||
      moveCaret(port, kernel, by);
    return true;
  }
  if ((key === '+' || key === '-') && letterKeys) {
    const by = (key === '+' ? 1 : -1) * grid.pixelSpacingMm[1];
    return changeShape(port, kernel, 'grow', (shape) => growShape(shape, by, shapeCentre(shape)));
  }
  if (key === 'Home' || key === 'End') {
    const end = stackOf(state, kernel)?.slices.at(key === 'Home' ? 0 : -1);
    if (end !== undefined) port.change('Scroll', scrollTo(kernel, end.alongMm));
    return true;
  }
  if (key === 'Enter') return enter(port, kernel, grid);
  if (key === 'Backspace' && state.openOutline !== undefined) {
    port.change('Take the point back', removePoint);
    return true;
  }
  return false;
}

/** What a key asks of a line. */
function lineKeyOf(
  key: string,
  shift: boolean,
  letterKeys: boolean,
  grid: SliceGrid,
  caretMm: Vec3,
): LineKey | undefined {
  const arrow = ARROWS[key];
  if (arrow !== undefined) return { kind: 'move', by: arrowMm(arrow, shift, grid) };
  if (key === 'Enter') return { kind: 'enter', atMm: onPlane(caretMm, grid) };
  if (key === 'Backspace') return { kind: 'back' };
  if (!letterKeys || (key !== '+' && key !== '-')) return undefined;
  return { kind: 'widen', steps: key === '+' ? 1 : -1 };
}

function arrowMm(arrow: readonly [number, number], shift: boolean, grid: SliceGrid): Vec3 {
  const pixels = shift ? FAST : 1;
  return add(
    scale(grid.rowDirection, arrow[0] * pixels * grid.pixelSpacingMm[1]),
    scale(grid.columnDirection, arrow[1] * pixels * grid.pixelSpacingMm[0]),
  );
}

/** Gives up, one thing at a time, what Esc gives up when no pointer is down. True when there was something. */
export function giveUp(port: ToolPort): boolean {
  const { openOutline, draft, lineDraft, lineEnd, selected, caret, courseStart } = port.now();
  if (courseStart !== undefined) {
    port.change('Give the course up', (state) => ({ ...state, courseStart: undefined }));
    return true;
  }
  if (lineDraft !== undefined || lineEnd !== undefined) {
    port.change('Give up', (state) => ({ ...state, lineDraft: undefined, lineEnd: undefined }));
    return true;
  }
  if (openOutline !== undefined || draft !== undefined) {
    port.change('Give up', (state) => ({ ...state, openOutline: undefined, draft: undefined }));
    return true;
  }
  if (selected === undefined && caret === undefined) return false;
  port.change('Select nothing', (state) => ({ ...state, selected: undefined, caret: undefined }));
  return true;
}

/** Changes the shape being placed, or the selected region where it lies on this plate. */
function changeShape(
  port: ToolPort,
  kernel: Kernel,
  what: string,
  change: (shape: Shape) => Shape,
): boolean {
  const { draft, note, openOutline } = port.now();
  if (openOutline !== undefined) return false;
  if (draft !== undefined) {
    port.change('Change the shape', (state) => ({
      ...state,
      draft: state.draft && { ...state.draft, shape: change(state.draft.shape) },
    }));
    return true;
  }
  const region = selectedRegion(port.now());
  if (region === undefined || note?.verification === 'VERIFIED') return false;
  if (!isOnPlate(port.now(), kernel, region.shape)) return false;
  port.reshapeRegion(region.id, change(region.shape), `${what}:${region.id}`);
  return true;
}

function moveCaret(port: ToolPort, kernel: Kernel, by: Vec3): void {
  port.change('Move the crosshair', (state) => ({
    ...state,
    caret: { kernel, pointMm: add(caretPoint(state, kernel), by) },
  }));
}

/** Where the crosshair is; on a plate that has none, in the middle. */
function caretPoint(state: AppState, kernel: Kernel): Vec3 {
  return state.caret?.kernel === kernel ? state.caret.pointMm : state.plates[kernel].centreMm;
}

function enter(port: ToolPort, kernel: Kernel, grid: SliceGrid): boolean {
  const state = port.now();
  if (state.draft !== undefined) {
    const { regionId, role, shape } = state.draft;
    if (regionId === undefined) port.placeRegion(role, shape);
    else port.reshapeRegion(regionId, shape);
    return true;
  }
  const pointMm = onPlane(caretPoint(state, kernel), grid);
  if (state.tool === 'ellipse') {
    if (!canMark(port, kernel)) return true;
    port.change('Place an ellipse', (now) => ({
      ...now,
      selected: undefined,
      caret: { kernel, pointMm },
      draft: {
        kernel,
        role: now.role,
        shape: ellipseOn(grid, pointMm, [FIRST_RADIUS_MM, FIRST_RADIUS_MM]),
        regionId: undefined,
      },
    }));
    return true;
  }
  if (state.tool === 'cut') {
    setCoursePoint(port, kernel, pointMm);
    return true;
  }
  if (state.tool === 'stent' && state.selected === undefined) {
    fitStentAt(port, kernel, pointMm);
    return true;
  }
  if (state.tool !== 'outline') return false;
  if (!canMark(port, kernel)) return true;
  const last = state.openOutline?.pointsMm.at(-1);
  // Enter twice at one place closes the outline, as a second point there would be none.
  if (last?.every((mm, axis) => mm === pointMm[axis])) closeOutline(port);
  else setPoint(port, kernel, pointMm);
  return true;
}

/** The place of a slice's plane under a point, along the normal. */
function onPlane(pointMm: Vec3, grid: SliceGrid): Vec3 {
  return pixelToPatient(grid, patientToPixel(grid, pointMm));
}
