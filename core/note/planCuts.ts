import type { SliceGrid } from '../geometry/index.js';
import type { CutSlice } from '../oblique/index.js';
import { type Result, refuse, success } from '../result.js';
import type { Stack } from '../stack/index.js';
import type { StackStoredOf } from './measurePlan.js';
import type { Plan } from './plan.js';
import { cutFacts, cutPlaneOf, planeGridOf, unknownPlane } from './planeCuts.js';
import type { CutFacts } from './planes.js';

/** The oblique planes of a plan, each cut once from each stack when it is first asked for. */
export interface PlanCuts {
  /** The grid of a plane; refused where the plan has no such plane or no plane can be laid there. */
  gridOf(planeId: string): Result<SliceGrid>;
  /** The cut of a stack; refused where the grid is, and where the stack can't be cut. */
  cutOf(planeId: string, stack: Stack): Result<CutSlice>;
  /** What is known of a plane once it was cut; undefined where it can't be. */
  factsOf(planeId: string): CutFacts | undefined;
}

/** The planes of a plan on its stacks. */
export function planCuts(
  { planes = [] }: Plan,
  soft: Stack,
  sharp: Stack | undefined,
  storedOf: StackStoredOf,
): PlanCuts {
  const grids = new Map<string, Result<SliceGrid>>();
  const cuts = new Map<Stack, Map<string, Result<CutSlice>>>();

  const gridOf = (planeId: string): Result<SliceGrid> => {
    const known = grids.get(planeId);
    if (known !== undefined) return known;
    const plane = planes.find(({ id }) => id === planeId);
    const { code, text } = unknownPlane(planeId);
    const grid = plane === undefined ? refuse(code, text) : planeGridOf(plane, soft, sharp);
    grids.set(planeId, grid);
    return grid;
  };

  const cutNow = (planeId: string, stack: Stack): Result<CutSlice> => {
    const grid = gridOf(planeId);
    const plane = planes.find(({ id }) => id === planeId);
    if (!grid.ok) return grid;
    if (plane === undefined) throw new RangeError(`a grid without its plane: ${planeId}`);
    const cut = cutPlaneOf(plane, grid.value, stack, (index) => storedOf(stack, index));
    return cut.ok ? success(cut.value.cut) : cut;
  };

  const cutOf = (planeId: string, stack: Stack): Result<CutSlice> => {
    const ofStack = cuts.get(stack) ?? new Map<string, Result<CutSlice>>();
    cuts.set(stack, ofStack);
    const known = ofStack.get(planeId);
    if (known !== undefined) return known;
    const found = cutNow(planeId, stack);
    ofStack.set(planeId, found);
    return found;
  };

  return {
    gridOf,
    cutOf,
    factsOf: (planeId) => {
      const grid = gridOf(planeId);
      const ofSoft = cutOf(planeId, soft);
      const ofSharp = sharp && cutOf(planeId, sharp);
      if (!grid.ok || !ofSoft.ok) return undefined;
      return cutFacts(grid.value, {
        soft: ofSoft.value,
        sharp: ofSharp?.ok === true ? ofSharp.value : undefined,
      });
    },
  };
}
