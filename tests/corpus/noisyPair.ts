import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { ctSlice } from './ctSlice.js';

/** Pixels to the side of {@link noisyStack}'s slices, and their distance, mm. */
export const MATRIX = 128;
export const SPACING_MM = 0.5;

/** Even patches of 12 × 12 pixels along the top edge: their first columns, and what the sharp stack has more there, HU. */
export const PATCHES = [
  { column: 4, differenceHu: -200 },
  { column: 20, differenceHu: -100 },
  { column: 36, differenceHu: 0 },
  { column: 52, differenceHu: 100 },
  { column: 68, differenceHu: 200 },
  { column: 84, differenceHu: 'padding' },
] as const;
export const PATCH_PX = 12;

const PADDING = -2000;
const SLICES = 10;

export interface NoisyStack {
  readonly kind: 'soft' | 'sharp';
  readonly series: string;
  readonly number: number;
  readonly frameOfReference?: string;
}

/**
 * Writes a stack of an invented object with noise of one sequence: the soft kind smoothed wide, the sharp one narrow.
 * Synthetic, and no reconstruction: it only has to differ as two kernels do.
 */
export function noisyStack(
  folder: string,
  { kind, series, number, frameOfReference }: NoisyStack,
): void {
  mkdirSync(folder, { recursive: true });
  for (let slice = 0; slice < SLICES; slice++) {
    const change = {
      1572960: { tag: 0x00180060, vr: 'DS', value: 120 },
      1577488: { tag: 0x00181210, vr: 'SH', value: `K${number}` },
      2097169: { tag: 0x00200011, vr: 'IS', value: number },
      2097170: { tag: 0x00200012, vr: 'IS', value: 7 },
      2134593: { tag: 0x00209241, vr: 'FL', value: 75 },
      2621488: { tag: 0x00280030, vr: 'DS', value: [SPACING_MM, SPACING_MM] },
      2621728: { tag: 0x00280120, vr: 'SS', value: PADDING },
      ...(frameOfReference !== undefined && frameElement(frameOfReference)),
    } as const;
    const options = { rows: MATRIX, columns: MATRIX, stored: storedOf(kind, slice), change };
    writeFileSync(
      join(folder, `${number}-${slice}`),
      ctSlice({ ...options, series, number: slice + 1, z: slice }),
    );
  }
}

function frameElement(uid: string) {
  return { 2097234: { tag: 0x00200052, vr: 'UI', value: uid } } as const;
}

function storedOf(kind: 'soft' | 'sharp', slice: number): Int16Array {
  const white = whiteNoise(slice + 1);
  const blur = kind === 'soft' ? 1.6 : 0.6;
  const object = Float64Array.from({ length: MATRIX * MATRIX }, (_, index) =>
    objectHu(index % MATRIX, Math.floor(index / MATRIX)),
  );
  const noisy = smoothed(
    object.map((hu, index) => hu + 60 * (white[index] ?? 0)),
    blur,
  );
  const stored = Int16Array.from(noisy, (hu) => Math.round(hu) + 1024);
  for (const { column, differenceHu } of PATCHES) {
    for (let y = 4; y < 4 + PATCH_PX; y++) {
      for (let x = column; x < column + PATCH_PX; x++) {
        const isPadding = differenceHu === 'padding';
        const more = isPadding ? PADDING : 1024 + differenceHu;
        stored[y * MATRIX + x] = kind === 'soft' ? 1024 : more;
      }
    }
  }
  return stored;
}

/** A large vessel of 300 HU in tissue of 40 HU, with smaller ones around it to tell a shift by. */
function objectHu(x: number, y: number): number {
  const isIn = (centreX: number, centreY: number, radius: number): boolean =>
    Math.hypot(x - centreX, y - centreY) < radius;
  if (isIn(64, 76, 30)) return 300;
  if (isIn(20, 40, 7) || isIn(108, 44, 9) || isIn(16, 108, 8) || isIn(110, 112, 8)) return 250;
  return 40;
}

/** White noise of SD 1 in a fixed sequence: a sum of twelve even numbers of a linear congruential generator. */
function whiteNoise(seed: number): Float64Array {
  let state = seed * 2654435761;
  const next = (): number => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 2 ** 32;
  };
  return Float64Array.from({ length: MATRIX * MATRIX }, () => {
    let sum = -6;
    for (let part = 0; part < 12; part++) sum += next();
    return sum;
  });
}

/** Smoothed by a Gaussian of this SD, pixels, along rows and then columns. */
function smoothed(values: Float64Array, sd: number): Float64Array {
  const reach = Math.ceil(3 * sd);
  const weights = Array.from({ length: 2 * reach + 1 }, (_, index) =>
    Math.exp(-((index - reach) ** 2) / (2 * sd * sd)),
  );
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  const along = (from: Float64Array, step: 'row' | 'column'): Float64Array =>
    from.map((_, index) => {
      const [x, y] = [index % MATRIX, Math.floor(index / MATRIX)];
      return weights.reduce((sum, weight, place) => {
        const at = (step === 'row' ? x : y) + place - reach;
        const inside = Math.min(Math.max(at, 0), MATRIX - 1);
        const neighbour = step === 'row' ? y * MATRIX + inside : inside * MATRIX + x;
        return sum + (weight / total) * (from[neighbour] ?? 0);
      }, 0);
    });
  return along(along(values, 'row'), 'column');
}
