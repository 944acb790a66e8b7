import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import type { SliceGrid, Vec3 } from '../../../core/geometry/index.js';
import { obliquePlane } from '../../../core/oblique/index.js';
import { measureSharpness } from '../../../core/pairing/sharpness.js';
import type { PairTexture } from '../../../core/quality/index.js';
import type { Stack } from '../../../core/stack/index.js';
import type { StoredOfStack } from '../../../core/stent/index.js';
import { type ImageStack, imageStack, readFrom } from './imageStack.js';
import type { TrueStent } from './stentScene.js';

/** A volume of obliqueStents.py, which the program had no part in. */
export interface ObliqueVolume {
  readonly truth: TrueStent;
  readonly middleMm: Vec3;
  readonly axis: Vec3;
  readonly soft: ImageStack;
  readonly sharp: ImageStack;
}

interface Written {
  readonly size: number;
  readonly pixelMm: number;
  readonly heightsMm: readonly number[];
  readonly thicknessMm: number;
  readonly centreMm: Vec3;
  readonly axis: Vec3;
  readonly innerDiameterMm: number;
  readonly strutMm: number;
  readonly massHuMm: number;
  readonly lumenHu: number;
  readonly wallMm: number;
}

/** Makes a volume; with 'bare' the same vessel without struts. */
export function makeObliqueVolume(seed: number, tiltDeg: number, kind?: 'bare'): ObliqueVolume {
  const folder = mkdtempSync(join(tmpdir(), 'oblique-'));
  try {
    // npm runs every script in the project's own folder.
    const script = resolve('tests/reference/obliqueStents.py');
    const args = [script, folder, `${seed}`, `${tiltDeg}`, ...(kind === undefined ? [] : [kind])];
    execFileSync('/usr/bin/python3', args);
    const written = JSON.parse(readFileSync(join(folder, 'truth.json'), 'utf8')) as Written;
    const { centreMm, axis, innerDiameterMm, strutMm, massHuMm, lumenHu, wallMm } = written;
    return {
      truth: {
        centreMm: [centreMm[0], centreMm[1]],
        innerDiameterMm,
        strutMm,
        massHuMm,
        lumenHu,
        wallMm,
        tiltDeg,
        azimuthDeg: 0,
        wires: 0,
      },
      middleMm: centreMm,
      axis,
      soft: stackOf(written, folder, 'soft'),
      sharp: stackOf(written, folder, 'sharp'),
    };
  } finally {
    rmSync(folder, { recursive: true });
  }
}

function stackOf(
  { size, pixelMm, heightsMm, thicknessMm }: Written,
  folder: string,
  side: string,
): ImageStack {
  const bytes = readFileSync(join(folder, `${side}.bin`));
  const slices = heightsMm.map((zMm, slice) => ({
    zMm,
    hu: Float64Array.from({ length: size * size }, (_, pixel) =>
      bytes.readInt16LE(2 * (slice * size * size + pixel)),
    ),
  }));
  const grid = { centreMm: [0, 0], fieldOfViewMm: size * pixelMm, matrix: size } as const;
  return imageStack(side, grid, slices, { thicknessMm });
}

/** A plane across a volume's vessel, a place half a mm off its axis as a click may be, and what a fit needs. */
export async function obliqueGround(
  { soft, sharp, middleMm: c, axis }: ObliqueVolume,
  course: Vec3 = axis,
): Promise<{
  readonly centreMm: Vec3;
  readonly plane: SliceGrid;
  readonly stacks: readonly [Stack, Stack, StoredOfStack, PairTexture];
}> {
  const { textures, text } = await measureSharpness(soft.stack, sharp.stack, readFrom(soft, sharp));
  if (textures === undefined) throw new RangeError(`nothing measured: ${text}`);
  const along = (mm: number): Vec3 => [
    c[0] + mm * course[0],
    c[1] + mm * course[1],
    c[2] + mm * course[2],
  ];
  const plane = obliquePlane(
    [along(-4), along(4)],
    [soft.stack.slices[0].image.grid, sharp.stack.slices[0].image.grid],
    undefined,
    { rows: 96, columns: 96 },
  );
  if (!plane.ok) throw new RangeError(plane.refusal.text);
  const [x, y, z] = plane.value.rowDirection;
  const storedOf: StoredOfStack = (stack, slice) =>
    (stack === soft.stack ? soft : sharp).stored[slice];
  return {
    centreMm: [c[0] + 0.5 * x, c[1] + 0.5 * y, c[2] + 0.5 * z],
    plane: plane.value,
    stacks: [soft.stack, sharp.stack, storedOf, { soft: textures.first, sharp: textures.second }],
  };
}
