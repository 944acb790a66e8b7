import {
  add,
  alongNormal,
  dot,
  gridNormal,
  normalise,
  type SliceGrid,
  scale,
  subtract,
} from '../../../core/geometry/index.js';
import {
  addPlane,
  changePlane,
  type Kernel,
  type NotePlane,
  type PlanePlacement,
  type PlanPlane,
  removePlane,
} from '../../../core/note/index.js';
import type { CutPair, Cuts } from '../../volumes/cuts.js';
import type { AppState, PlateState } from '../appState.js';
import { editNote, withSelection } from '../history.js';
import type { Change } from '../store.js';
import { scrollBy } from './view.js';

/** What the page cuts planes with. */
type Cutter = Pick<Cuts, 'of'>;

/** A turn of the wheel or a page key moves a plane by this, mm: a usual distance of slices. */
const SHIFT_MM = 0.5;

/** Marks that belong to a surface; another surface has none of them. */
const NOTHING_BEGUN = {
  draft: undefined,
  openOutline: undefined,
  lineDraft: undefined,
  lineEnd: undefined,
  courseStart: undefined,
  caret: undefined,
} as const satisfies Partial<AppState>;

/** Puts a new oblique plane into the note and shows it. */
export function placePlane(placement: PlanePlacement, cuts: Cutter, now: string): Change {
  return (state) => {
    if (state.note === undefined) return state;
    const cut = cuts.of({ id: 'new', ...placement });
    if (cut === undefined) return state;
    if (!cut.ok) return warned({ ...state, courseStart: undefined }, cut.refusal.text);
    const { note, plane } = addPlane(state.note, placement, cut.value.facts, now);
    const edited = editNote(`Make ${plane.label}`, () => note)(state);
    return edited.note === note ? showPlane(plane.id, cuts)(edited) : edited;
  };
}

/** Shows an oblique plane of the note on both plates. */
export function showPlane(planeId: string, cuts: Cutter): Change {
  return (state) => {
    const plane = planeOf(state, planeId);
    const cut = plane && cuts.of(plane);
    if (plane === undefined || cut === undefined) return state;
    if (!cut.ok) return warned(state, cut.refusal.text);
    const before = state.cut?.before ?? state.plates;
    return {
      ...state,
      ...NOTHING_BEGUN,
      tool: state.tool === 'cut' ? 'window' : state.tool,
      cut: { planeId, ...stacksOf(cut.value), before },
      plates: placed(state, plane, cut.value),
      selected: isOn(state, planeId) ? state.selected : undefined,
      message: { tone: 'plain', text: `${plane.label}, resampled by ${plane.resampling}.` },
    };
  };
}

/** Goes back to the slices, where the plates were. */
export function leavePlane(state: AppState): AppState {
  const { cut } = state;
  if (cut === undefined) return state;
  const onPlane = isOn(state, cut.planeId);
  return {
    ...state,
    ...NOTHING_BEGUN,
    cut: undefined,
    selected: onPlane ? undefined : state.selected,
    plates: platesOnSlices(state),
  };
}

/** The plates as they are on the slices: under an oblique cut as they were, with the window and size of now. */
export function platesOnSlices({
  cut,
  plates,
}: Pick<AppState, 'cut' | 'plates'>): AppState['plates'] {
  if (cut === undefined) return plates;
  const of = (kernel: Kernel): PlateState => {
    const { window, size } = plates[kernel];
    return { ...cut.before[kernel], window, size };
  };
  return { soft: of('soft'), sharp: of('sharp') };
}

/** Gives the plane another course, interpolation or thickness; refused, and told, where something lies on it. */
export function movePlane(
  planeId: string,
  placement: PlanePlacement,
  cuts: Cutter,
  now: string,
  key?: string,
): Change {
  return (state) => {
    const plane = planeOf(state, planeId);
    if (state.note === undefined || plane === undefined) return state;
    const cut = cuts.of({ id: planeId, ...placement });
    if (cut === undefined) return state;
    if (!cut.ok) return warned(state, cut.refusal.text);
    const changed = changePlane(state.note, planeId, placement, cut.value.facts, now);
    if (!changed.ok) return warned(state, changed.refusal.text);
    const { note } = changed.value;
    const edited = editNote(`Change ${plane.label}`, () => note, key)(state);
    if (edited.note !== note || state.cut?.planeId !== planeId) return edited;
    const shown = { ...state.cut, ...stacksOf(cut.value) };
    return { ...edited, cut: shown, plates: placed(edited, changed.value.plane, cut.value) };
  };
}

/** Goes through the slices; on an oblique cut the plane itself moves along the vessel, as long as nothing lies on it. */
export function scrollOrShift(kernel: Kernel, steps: number, cuts: Cutter, now: string): Change {
  return (state) => {
    const plane = state.cut && planeOf(state, state.cut.planeId);
    if (plane === undefined) return scrollBy(kernel, steps)(state);
    const [from, to] = plane.courseMm;
    const course = normalise(subtract(to, from));
    if (course === undefined) return state;
    // Up is up the body, as on the slices, whichever way the course was set.
    const way = dot(course, gridNormal(plateNormalGrid(state))) < 0 ? -1 : 1;
    const by = scale(course, way * steps * SHIFT_MM);
    const { interpolation, slabMm } = plane;
    const placement: PlanePlacement = {
      courseMm: [add(from, by), add(to, by)],
      ...(interpolation === undefined ? {} : { interpolation }),
      ...(slabMm === undefined ? {} : { slabMm }),
    };
    return movePlane(plane.id, placement, cuts, now, `shift:${plane.id}`)(state);
  };
}

/** The grid of the pair's slices, whose normal says where up is. */
function plateNormalGrid({ pair }: AppState): SliceGrid {
  const grid = pair?.soft.slices[0].image.grid;
  if (grid === undefined) throw new RangeError('a cut without its pair');
  return grid;
}

/** Removes an oblique plane; refused, and told, where something lies on it. */
export function deletePlane(planeId: string, now: string): Change {
  return (state) => {
    const plane = planeOf(state, planeId);
    if (state.note === undefined || plane === undefined) return state;
    const removed = removePlane(state.note, planeId, now);
    if (!removed.ok) return warned(state, removed.refusal.text);
    const edited = editNote(`Delete ${plane.label}`, () => removed.value)(state);
    if (edited.note !== removed.value) return edited;
    const text = `${plane.label} deleted. Undo brings it back.`;
    return withSelection({ ...edited, message: { tone: 'plain', text } });
  };
}

/** The cut that is shown, cut again where slices have come since. */
export function renewedCut(cuts: Cutter): Change {
  return (state) => {
    const plane = state.cut && planeOf(state, state.cut.planeId);
    const cut = plane && cuts.of(plane);
    if (state.cut === undefined || cut?.ok !== true) return state;
    const stacks = stacksOf(cut.value);
    if (stacks.soft === state.cut.soft && stacks.sharp === state.cut.sharp) return state;
    return { ...state, cut: { ...state.cut, ...stacks } };
  };
}

function planeOf({ note }: AppState, planeId: string): NotePlane | undefined {
  return note?.planes.find(({ id }) => id === planeId);
}

function stacksOf({ soft, sharp }: CutPair): Pick<NonNullable<AppState['cut']>, 'soft' | 'sharp'> {
  return { soft: soft.stack, sharp: sharp?.stack };
}

/** Both plates on the plane, its middle in their middle. */
function placed(
  state: AppState,
  { courseMm: [from, to] }: Pick<PlanPlane, 'courseMm'>,
  { grid }: CutPair,
): AppState['plates'] {
  const centreMm = [(from[0] + to[0]) / 2, (from[1] + to[1]) / 2, (from[2] + to[2]) / 2] as const;
  const alongMm = alongNormal(grid, grid.positionMm);
  const onPlane = (plate: PlateState): PlateState => ({ ...plate, alongMm, centreMm });
  return { soft: onPlane(state.plates.soft), sharp: onPlane(state.plates.sharp) };
}

/** Whether what is selected lies on a plane. */
function isOn({ note, selected }: AppState, planeId: string): boolean {
  if (note === undefined) return false;
  const items = [...note.regions, ...note.edges, ...note.profiles, ...note.stents];
  return items.some(({ id, plane }) => id === selected && plane === planeId);
}

function warned(state: AppState, text: string): AppState {
  return { ...state, message: { tone: 'warning', text } };
}
