import type { SliceGrid } from '../../core/geometry/index.js';
import {
  type CutFacts,
  cutFacts,
  cutPlaneOf,
  type Kernel,
  type PlanPlane,
  planeGridOf,
} from '../../core/note/index.js';
import type { CutSlice } from '../../core/oblique/index.js';
import { type Result, success } from '../../core/result.js';
import type { PairVolumes } from './loadPair.js';
import { isWhole, type StoredSlice, type Volume } from './volume.js';

/** A plane cut from both stacks, as far as their slices have come. */
export interface CutPair {
  readonly grid: SliceGrid;
  readonly soft: CutSlice;
  readonly sharp: CutSlice | undefined;
  readonly facts: CutFacts;
  /** False while slices that it needs are still to come. */
  readonly isWhole: boolean;
}

/** Cuts oblique planes from the pixels of the page. */
export interface Cuts {
  /** A plane's cut now; undefined while nothing is shown, refused where no plane can be laid. */
  of(plane: PlanPlane): Result<CutPair> | undefined;
  /** Stored values of a plane's cut. */
  stored(plane: PlanPlane, kernel: Kernel): StoredSlice | undefined;
}

interface Kept {
  readonly plane: PlanPlane;
  readonly volumes: PairVolumes;
  readonly held: number;
  readonly cut: Result<CutPair>;
}

/** @param volumes the pixels now; undefined while nothing is shown */
export function createCuts(volumes: () => PairVolumes | undefined): Cuts {
  const kept = new Map<string, Kept>();

  const cutNow = (plane: PlanPlane, both: PairVolumes): Result<CutPair> => {
    const grid = planeGridOf(plane, both.soft.stack, both.sharp?.stack);
    if (!grid.ok) return grid;
    const on = ({ stack, slice }: Volume) => cutPlaneOf(plane, grid.value, stack, slice);
    const soft = on(both.soft);
    if (!soft.ok) return soft;
    const sharp = both.sharp && on(both.sharp);
    if (sharp?.ok === false) return sharp;
    const cuts = { soft: soft.value.cut, sharp: sharp?.value.cut };
    const lacking = soft.value.lacking.length + (sharp?.value.lacking.length ?? 0);
    if (lacking > 0) {
      askFor(both.soft, soft.value.lacking);
      if (both.sharp !== undefined) askFor(both.sharp, sharp?.value.lacking ?? []);
    }
    return success({
      grid: grid.value,
      ...cuts,
      facts: cutFacts(grid.value, cuts),
      isWhole: lacking === 0,
    });
  };

  const of = (plane: PlanPlane): Result<CutPair> | undefined => {
    const both = volumes();
    if (both === undefined) return undefined;
    const held = both.soft.size + (both.sharp?.size ?? 0);
    const known = kept.get(plane.id);
    if (known !== undefined && known.volumes === both && isSamePlane(known.plane, plane)) {
      if (!known.cut.ok || known.cut.value.isWhole || known.held === held) return known.cut;
    }
    const cut = cutNow(plane, both);
    kept.set(plane.id, { plane, volumes: both, held, cut });
    return cut;
  };

  return {
    of,
    stored: (plane, kernel) => {
      const cut = of(plane);
      return cut?.ok === true ? cut.value[kernel]?.stored : undefined;
    },
  };
}

/** A volume that holds all its stack reads them by itself; one that holds a part is asked. */
function askFor(volume: Volume, lacking: readonly number[]): void {
  if (!isWhole(volume)) for (const index of lacking) volume.ask(index);
}

function isSamePlane(a: PlanPlane, b: PlanPlane): boolean {
  return (
    a === b ||
    (a.interpolation === b.interpolation &&
      a.slabMm === b.slabMm &&
      JSON.stringify(a.courseMm) === JSON.stringify(b.courseMm))
  );
}
