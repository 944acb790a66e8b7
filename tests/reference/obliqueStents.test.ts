/**
 * Stents fitted on oblique cuts, against volumes that the program had no part in (obliqueStents.py): a tube's spectrum in closed
 * form passed by kernel and slice thickness in numpy's FFT, filtered white noise, sampled by scipy.
 */
import { describe, expect, it } from 'vitest';
import type { Vec3 } from '../../core/geometry/index.js';
import { fitStentOnCut } from '../../core/oblique/index.js';
import { type FittedStent, fitStent } from '../../core/stent/index.js';
import {
  makeObliqueVolume,
  type ObliqueVolume,
  obliqueGround,
} from '../bench/evidence/obliqueVolume.js';
import { strutDiameterMm } from '../bench/evidence/stentScene.js';
import { pythonHas } from '../support/python.js';

const available = pythonHas('numpy', 'scipy');
const title = available
  ? 'stents on oblique cuts of volumes that numpy and scipy made'
  : 'stents on oblique cuts of volumes that numpy and scipy made (SKIPPED: install python3-scipy to run it)';

async function fitsOf(
  volume: ObliqueVolume,
  course?: Vec3,
): Promise<{ readonly onCut: FittedStent; readonly onSlices: FittedStent }> {
  const { centreMm, plane, stacks } = await obliqueGround(volume, course);
  return {
    onCut: fitStentOnCut({ centreMm }, plane, ...stacks),
    onSlices: fitStent({ centreMm: volume.middleMm }, ...stacks),
  };
}

describe.skipIf(!available)(title, () => {
  it.each([[12, 60]])(
    'seed %i, %i° oblique: within 0.15 mm and 60 HU, where the slices themselves give no value',
    async (seed, tiltDeg) => {
      const volume = makeObliqueVolume(seed, tiltDeg);
      const { onCut, onSlices } = await fitsOf(volume);
      if (onCut.reason !== undefined) throw new Error(onCut.reason.text);
      const offMm = onCut.strutDiameterMm.value - strutDiameterMm(volume.truth);
      const offHu = onCut.lumenHu.value - volume.truth.lumenHu;
      expect(Math.abs(offMm)).toBeLessThan(0.15);
      expect(Math.abs(offHu)).toBeLessThan(60);
      // Three standard errors: two fits in three hundred lie beyond by chance.
      expect(Math.abs(offMm)).toBeLessThan(3 * onCut.strutDiameterMm.se);
      expect(Math.abs(offHu)).toBeLessThan(3 * onCut.lumenHu.se);
      expect(onCut.tiltDeg).toBeLessThan(4);
      expect(onSlices.reason).toBeDefined();
    },
    60_000,
  );

  it('gives no value to the same vessel without struts, nor where the slices are too thick for the plane', async () => {
    const volume = makeObliqueVolume(11, 45, 'bare');
    expect((await fitsOf(volume)).onCut.reason?.code).toBe('no-ring');
    // A plane along the slices' normal is smeared by their thickness.
    expect((await fitsOf(volume, [1, 0, 0.05])).onCut.reason?.code).toBe('too-thick');
  }, 60_000);
});
