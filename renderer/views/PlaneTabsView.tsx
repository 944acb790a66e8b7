import type { NotePlane, PlanePlacement } from '../../core/note/index.js';
import { isSealed } from '../../core/note/life/index.js';
import { THICKEST_SLAB_MM } from '../../core/oblique/index.js';
import { useEngine } from '../engine.js';
import { PlaneTabs } from '../panels/PlaneTabs.js';
import { leavePlane, movePlane, showPlane } from '../state/changes/cut.js';
import { isBlind } from '../state/regionSelectors.js';
import { useSelected } from './useSelected.js';

/** The oblique cuts of the note in the hinge; nothing while there is none. */
export function PlaneTabsView() {
  const { store, bench, run, now } = useEngine();
  const note = useSelected((state) => state.note);
  const cut = useSelected((state) => state.cut);
  const blind = useSelected(isBlind);
  useSelected((state) => state.loading);
  if (note === undefined || note.planes.length === 0 || blind) return null;
  const shown = note.planes.find(({ id }) => id === cut?.planeId);
  const made = shown && bench.cuts.of(shown);
  const change = (plane: NotePlane, part: ChangedCut): void =>
    store.change('Change cut', movePlane(plane.id, placementOf(plane, part), bench.cuts, now()));
  return (
    <PlaneTabs
      planes={note.planes}
      shown={cut?.planeId}
      frozen={isSealed(note)}
      partial={made?.ok === true && !made.value.isWhole}
      onShow={(id) =>
        store.change('Show plane', id === undefined ? leavePlane : showPlane(id, bench.cuts))
      }
      onSlab={(slabMm) => {
        if (shown !== undefined && (slabMm ?? 0) <= THICKEST_SLAB_MM) change(shown, { slabMm });
      }}
      onInterpolation={(interpolation) => shown && change(shown, { interpolation })}
      onDelete={() => run('cut.delete')}
    />
  );
}

interface ChangedCut {
  readonly slabMm?: number | undefined;
  readonly interpolation?: 'linear' | 'cubic';
}

/** The plane's placement with a change; a slab that is named without a value is taken away. */
function placementOf(plane: NotePlane, change: ChangedCut): PlanePlacement {
  const { courseMm, interpolation, slabMm } = { ...plane, ...change };
  return {
    courseMm,
    ...(interpolation === undefined ? {} : { interpolation }),
    ...(slabMm === undefined ? {} : { slabMm }),
  };
}
