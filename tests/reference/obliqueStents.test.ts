/**
 * Stents fitted on oblique cuts, against volumes that the program had no part in (obliqueStents.py): a tube's spectrum in closed
 * form passed by kernel and slice thickness in numpy's FFT, filtered white noise, sampled by scipy.
 */
import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import type { Vec3 } from '../../core/geometry/index.js';
import { fitStentOnCut, obliquePlane } from '../../core/oblique/index.js';
import { measureSharpness } from '../../core/pairing/sharpness.js';
import { type FittedStent, fitStent, type StoredOfStack } from '../../core/stent/index.js';
import { type ImageStack, imageStack, readFrom } from '../bench/evidence/imageStack.js';
import { pythonHas } from '../support/python.js';

const available = pythonHas('numpy', 'scipy');
const title = available
  ? 'stents on oblique cuts of volumes that numpy and scipy made'
  : 'stents on oblique cuts of volumes that numpy and scipy made (SKIPPED: install python3-scipy to run it)';

interface Truth {
  readonly size: number;
  readonly pixelMm: number;
  readonly heightsMm: readonly number[];
  readonly thicknessMm: number;
  readonly centreMm: Vec3;
  readonly axis: Vec3;
  readonly innerDiameterMm: number;
  readonly strutMm: number;
  readonly lumenHu: number;
}

interface Volume {
  readonly truth: Truth;
  readonly soft: ImageStack;
  readonly sharp: ImageStack;
}

/** Makes a volume; by default with a stent, with 'bare' with the same vessel without struts. */
function volumeOf(seed: number, tiltDeg: number, kind?: 'bare'): Volume {
  const folder = mkdtempSync(join(tmpdir(), 'oblique-'));
  const script = join(import.meta.dirname, 'obliqueStents.py');
  const args = [script, folder, `${seed}`, `${tiltDeg}`, ...(kind === undefined ? [] : [kind])];
  execFileSync('/usr/bin/python3', args);
  const truth = JSON.parse(readFileSync(join(folder, 'truth.json'), 'utf8')) as Truth;
  const { size, pixelMm, heightsMm, thicknessMm } = truth;
  const grid = { centreMm: [0, 0], fieldOfViewMm: size * pixelMm, matrix: size } as const;
  const stackOf = (side: string): ImageStack => {
    const bytes = readFileSync(join(folder, `${side}.bin`));
    const slices = heightsMm.map((zMm, slice) => ({
      zMm,
      hu: Float64Array.from({ length: size * size }, (_, pixel) =>
        bytes.readInt16LE(2 * (slice * size * size + pixel)),
      ),
    }));
    return imageStack(side, grid, slices, { thicknessMm });
  };
  const made = { truth, soft: stackOf('soft'), sharp: stackOf('sharp') };
  rmSync(folder, { recursive: true });
  return made;
}

async function fitsOf(
  { truth, soft, sharp }: Volume,
  course: Vec3 = truth.axis,
): Promise<{
  readonly onCut: FittedStent;
  readonly onSlices: FittedStent;
}> {
  const { textures, text } = await measureSharpness(soft.stack, sharp.stack, readFrom(soft, sharp));
  if (textures === undefined) throw new Error(text);
  const texture = { soft: textures.first, sharp: textures.second };
  const storedOf: StoredOfStack = (stack, slice) =>
    (stack === soft.stack ? soft : sharp).stored[slice];
  const { centreMm: c } = truth;
  const a = course;
  const along = (mm: number): Vec3 => [c[0] + mm * a[0], c[1] + mm * a[1], c[2] + mm * a[2]];
  const plane = obliquePlane(
    [along(-4), along(4)],
    [soft.stack.slices[0].image.grid, sharp.stack.slices[0].image.grid],
    undefined,
    { rows: 96, columns: 96 },
  );
  if (!plane.ok) throw new Error(plane.refusal.text);
  const [x, y, z] = plane.value.rowDirection;
  // Half a mm off the axis, as a click may be.
  const centreMm: Vec3 = [c[0] + 0.5 * x, c[1] + 0.5 * y, c[2] + 0.5 * z];
  const stacks = [soft.stack, sharp.stack, storedOf, texture] as const;
  return {
    onCut: fitStentOnCut({ centreMm }, plane.value, ...stacks),
    onSlices: fitStent({ centreMm: c }, ...stacks),
  };
}

describe.skipIf(!available)(title, () => {
  it.each([
    [11, 35],
    [12, 60],
  ])(
    'seed %i, %i° oblique: within 0.15 mm and 60 HU, where the slices themselves give no value',
    async (seed, tiltDeg) => {
      const volume = volumeOf(seed, tiltDeg);
      const { onCut, onSlices } = await fitsOf(volume);
      if (onCut.reason !== undefined) throw new Error(onCut.reason.text);
      const { innerDiameterMm, strutMm, lumenHu } = volume.truth;
      const offMm = onCut.strutDiameterMm.value - (innerDiameterMm + strutMm);
      const offHu = onCut.lumenHu.value - lumenHu;
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
    const volume = volumeOf(11, 45, 'bare');
    expect((await fitsOf(volume)).onCut.reason?.code).toBe('no-ring');
    // A plane along the slices' normal is smeared by their thickness.
    expect((await fitsOf(volume, [1, 0, 0.05])).onCut.reason?.code).toBe('too-thick');
  }, 60_000);
});
