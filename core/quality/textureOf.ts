import type { Vec3 } from '../geometry/index.js';
import { blurOfRise, type KernelTexture } from './kernelTexture.js';
import type { NoisePower } from './noisePower.js';
import {
  addRings,
  meanFrequency,
  peakFrequency,
  type RingSums,
  ringSums,
} from './radialSpectrum.js';
import { type AreaSize, ringResponse } from './textureOfResponse.js';
import { type ShownRings, unfoldedPower } from './textureOfUnfold.js';

/** What one uniform area tells of the noise of one stack. */
export interface TextureArea {
  readonly centreMm: Vec3;
  readonly meanHu: number;
  /** About a second-order surface. */
  readonly sdHu: number;
  /** Pixels of the area; the lattice of its spectrum may be larger. */
  readonly columns: number;
  readonly rows: number;
  readonly power: NoisePower;
}

/** Rings of a texture's spectrum: what an area of 12 mm can tell apart, per mm. */
const RING_STEP_PER_MM = 0.08;
/** Lowest frequency at which a texture's spectrum is told, per mm. Below it nothing changes for any region. */
const LOWEST_PER_MM = 0.02;
/** At frequency 0 the noise is taken to have at least this part of the power of the first ring. */
const LEAST_AT_ZERO = 0.5;

/**
 * The texture of one stack's noise from uniform areas that were found on both stacks of a pair, up to the stack's own
 * highest frequency. What detrending took from the low frequencies is given back, see {@link unfoldedPower}.
 *
 * Between frequency 0 and the first ring no area of 12 mm tells anything. There the straight line through the first
 * two rings goes on, but never below half of the first ring and never above it: the noise of a plain filtered back
 * projection falls to near 0 there (Kijewski & Judy 1987, doi 10.1088/0031-9155/32/5/003), that of other
 * reconstructions may not. So the error of a wide region's mean is rather over- than understated.
 *
 * @param riseMm 10–90 % edge rise on this stack; undefined where no clean edge was found
 * @returns undefined without areas, or where the areas show no noise
 */
export function textureOf(
  areas: readonly TextureArea[],
  spacingMm: readonly [number, number],
  riseMm?: number,
): KernelTexture | undefined {
  if (areas.length === 0) return undefined;
  const highest = Math.min(1 / (2 * spacingMm[0]), 1 / (2 * spacingMm[1]));
  const rings = Math.floor(highest / RING_STEP_PER_MM + 1e-6) + 1;
  if (rings < 3) return undefined;
  const shown = bySize(areas, spacingMm).map(
    ({ size, members }): ShownRings => ({
      ...ringResponse(size, RING_STEP_PER_MM, rings),
      power: ringMeans(
        addRings(members.map(({ power }) => ringSums(power, RING_STEP_PER_MM, rings))),
      ),
      areas: members.length,
    }),
  );
  const power = unfoldedPower(shown);
  const frequencyPerMm = Array.from(power, (_, ring) => ring * RING_STEP_PER_MM).slice(1);
  const powerHu2Mm2 = Array.from(power).slice(1);
  const radial = {
    frequencyPerMm: Float64Array.from(frequencyPerMm),
    powerHu2Mm2: Float64Array.from(powerHu2Mm2),
  };
  const [meanPerMm, peakPerMm] = [meanFrequency(radial), peakFrequency(radial)];
  if (meanPerMm === undefined || peakPerMm === undefined) return undefined;
  return {
    noiseSdHu: Math.sqrt(areas.reduce((sum, { sdHu }) => sum + sdHu * sdHu, 0) / areas.length),
    areas: areas.length,
    frequencyPerMm: [LOWEST_PER_MM, ...frequencyPerMm],
    powerHu2Mm2: [lowestPower(powerHu2Mm2), ...powerHu2Mm2],
    meanPerMm,
    peakPerMm,
    riseMm: riseMm ?? null,
    blurFwhmMm: riseMm === undefined ? null : blurOfRise(riseMm),
    places: areas.map(({ centreMm: [x, y, z], sdHu, meanHu }) => ({
      centreMm: [rounded(x), rounded(y), rounded(z)],
      sdHu: rounded(sdHu),
      meanHu: rounded(meanHu),
    })),
  };
}

/** As fine as it means something: the note keeps each of up to a hundred places. */
function rounded(value: number): number {
  return Math.round(value * 100) / 100;
}

function lowestPower([first = 0, second = first]: readonly number[]): number {
  const atZero = Math.min(first, Math.max(2 * first - second, LEAST_AT_ZERO * first));
  return atZero + ((first - atZero) * LOWEST_PER_MM) / RING_STEP_PER_MM;
}

/** Areas of one size show the low frequencies alike. */
function bySize(
  areas: readonly TextureArea[],
  spacingMm: readonly [number, number],
): readonly { readonly size: AreaSize; readonly members: readonly TextureArea[] }[] {
  const groups = new Map<string, { size: AreaSize; members: TextureArea[] }>();
  for (const area of areas) {
    const { columns, rows, power } = area;
    const key = [columns, rows, power.columns, power.rows].join();
    const group = groups.get(key);
    if (group !== undefined) group.members.push(area);
    else
      groups.set(key, {
        size: {
          columns,
          rows,
          latticeColumns: power.columns,
          latticeRows: power.rows,
          spacingMm,
        },
        members: [area],
      });
  }
  return [...groups.values()];
}

function ringMeans({ power, weight }: RingSums): Float64Array {
  return power.map((sum, ring) => {
    const places = weight[ring] ?? 0;
    return places < 1e-6 ? 0 : sum / places;
  });
}
