import { fitStentOnCut } from '../../../core/oblique/index.js';
import { pythonHas } from '../../support/python.js';
import { makeObliqueVolume, obliqueGround } from './obliqueVolume.js';
import type { GridCase } from './stentGrid.js';

const TILTS_DEG = [30, 40, 50, 60, 65] as const;
const VOLUMES_EACH = 4;

/** Stents on oblique cuts of independent volumes; undefined where the programs for these are not installed. */
export async function obliqueFits(): Promise<
  readonly Pick<GridCase, 'truth' | 'fits'>[] | undefined
> {
  if (!pythonHas('numpy', 'scipy')) return undefined;
  const cases: Pick<GridCase, 'truth' | 'fits'>[] = [];
  for (const tiltDeg of TILTS_DEG)
    for (let index = 0; index < VOLUMES_EACH; index += 1) {
      const volume = makeObliqueVolume(10 * tiltDeg + index, tiltDeg);
      const { centreMm, plane, stacks } = await obliqueGround(volume);
      const both = fitStentOnCut({ centreMm }, plane, ...stacks);
      cases.push({ truth: volume.truth, fits: { both } });
    }
  return cases;
}
