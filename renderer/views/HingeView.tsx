import type { NoteRegion } from '../../core/note/index.js';
import { useEngine } from '../engine.js';
import { positionIn } from '../link/slicePosition.js';
import { Hinge } from '../panels/Hinge.js';
import type { PairedReadoutProps } from '../panels/PairedReadout.js';
import { ProfileReadout } from '../panels/ProfileReadout.js';
import { StentReadout } from '../panels/StentReadout.js';
import type { RulerMark, TwinRulerProps } from '../panels/TwinRuler.js';
import type { Bench } from '../services/bench.js';
import type { AppState } from '../state/appState.js';
import { goToRegion } from '../state/changes/goToRegion.js';
import { selectRegion } from '../state/changes/regions.js';
import { scrollTo } from '../state/changes/view.js';
import { selectedProfile } from '../state/lineSelectors.js';
import { selectedRegion, shownRegions, sliceOf } from '../state/regionSelectors.js';
import { linksOf } from '../state/selectors.js';
import { selectedStent } from '../state/stentSelectors.js';
import type { Change, Store } from '../state/store.js';
import { PlaneTabsView } from './PlaneTabsView.js';
import { useSelected } from './useSelected.js';
import { verdictOf } from './verdict.js';

/** The hinge, from the state; while a shape is drawn or dragged its numbers are measured at every step. */
export function HingeView() {
  const { store, bench } = useEngine();
  const pair = useSelected((state) => state.pair);
  const assessment = useSelected((state) => state.assessment);
  const note = useSelected((state) => state.note);
  const selected = useSelected((state) => state.selected);
  const draft = useSelected((state) => state.draft);
  const stent = useSelected(selectedStent);
  const profile = useSelected(selectedProfile);
  const cut = useSelected((state) => state.cut);
  const place = useSelected(rulerPosition);
  // Values of a draft can come with its slice, so the reading of slices is followed too.
  useSelected((state) => state.loading);
  const state = { pair, note, selected, draft, cut };
  return (
    <Hinge
      verdict={verdictOf(pair, assessment, {
        onSwap: () => void bench.swapPair(),
        onCancel: bench.cancelAssessment,
        onMeasure: bench.assessAgain,
      })}
      ruler={rulerOf(store, bench.cuts, state, place)}
      planes={<PlaneTabsView />}
      across={
        stent !== undefined ? (
          <StentReadout stent={stent} />
        ) : profile !== undefined ? (
          <ProfileReadout profile={profile} />
        ) : undefined
      }
      readout={{ region: readoutOf(state, bench), unit: pair?.soft.unit ?? 'HU' }}
    />
  );
}

type HingeState = Pick<AppState, 'pair' | 'note' | 'selected' | 'draft' | 'cut'>;

function rulerOf(
  store: Store,
  cuts: Bench['cuts'],
  { pair, note, selected, cut }: HingeState,
  positionMm: number | undefined,
): TwinRulerProps | undefined {
  // The ruler counts slices: an oblique cut lies on many of them.
  if (pair === undefined || positionMm === undefined || cut !== undefined) return undefined;
  const { soft, sharp } = pair;
  return {
    softMm: positionsOf(soft),
    sharpMm: sharp === undefined || pair.link === 'index' ? undefined : positionsOf(sharp, soft),
    positionMm,
    marks: onSlices(shownRegions({ note })).flatMap((region) => markOf(region, pair, selected)),
    onMove: (alongMm) => store.change('Scroll', scrollOnRuler(alongMm)),
    onMark: (id) => {
      store.change('Select region', selectRegion(id));
      store.change('Go to region', goToRegion(cuts));
    },
  };
}

/** Whether the ruler moves the sharp plate: it is active, not linked, and its positions can be stated on the ruler. */
function movesSharp(state: AppState): boolean {
  return !linksOf(state).scroll && state.active === 'sharp' && state.pair?.link === 'position';
}

/** Where the ruler's handle stands, mm along the soft stack; undefined beyond both stacks. */
function rulerPosition(state: AppState): number | undefined {
  const { plates, pair } = state;
  if (pair === undefined) return undefined;
  const mm =
    movesSharp(state) && pair.sharp !== undefined
      ? positionIn(pair.sharp, plates.sharp.alongMm, pair.soft)
      : plates.soft.alongMm;
  return mm !== undefined && Number.isFinite(mm) ? mm : undefined;
}

function scrollOnRuler(alongMm: number): Change {
  return (state) => {
    const { pair } = state;
    if (!movesSharp(state) || pair?.sharp === undefined) return scrollTo('soft', alongMm)(state);
    const sharpMm = positionIn(pair.soft, alongMm, pair.sharp);
    return sharpMm === undefined ? state : scrollTo('sharp', sharpMm)(state);
  };
}

const positions = new WeakMap<object, readonly number[]>();

/** Positions of a stack's slices along its own normal, or along that of another stack; ascending. */
function positionsOf(
  stack: NonNullable<AppState['pair']>['soft'],
  along: typeof stack = stack,
): readonly number[] {
  const known = positions.get(stack);
  if (known !== undefined) return known;
  const list = stack.slices
    .flatMap(({ alongMm }) => positionIn(stack, alongMm, along) ?? [])
    .sort((a, b) => a - b);
  positions.set(stack, list);
  return list;
}

function onSlices(regions: readonly NoteRegion[]): readonly NoteRegion[] {
  return regions.filter(({ plane }) => plane === undefined);
}

function markOf(
  { id, label, role, shape }: NoteRegion,
  { soft }: NonNullable<AppState['pair']>,
  selected: string | undefined,
): readonly RulerMark[] {
  const index = sliceOf(shape, soft);
  const alongMm = index === undefined ? undefined : soft.slices[index]?.alongMm;
  if (alongMm === undefined) return [];
  return [{ regionId: id, label, role, alongMm, selected: id === selected }];
}

function readoutOf(
  { note, selected, draft, cut }: HingeState,
  bench: Pick<Bench, 'measure'>,
): PairedReadoutProps['region'] {
  const region = selectedRegion({ note, selected });
  if (draft === undefined) return region;
  const values = bench.measure(draft.shape, cut?.planeId);
  if (region !== undefined && draft.regionId === region.id) return { ...region, ...values };
  return { label: `New ${draft.role}`, place: '', role: draft.role, ...values };
}
