import type { RegionValues } from '../../core/note/index.js';
import {
  FLAGS,
  findSlice,
  measureRegion,
  type NoiseOfStack,
  type RegionValue,
  type Shape,
} from '../../core/region/index.js';
import type { PairVolumes } from './loadPair.js';
import type { StoredSlice, Volume } from './volume.js';

/**
 * Measures shapes on both stacks; what was measured once is remembered with the shape, also when its slice
 * was dropped since to make room for others.
 */
export type MeasureShape = (shape: Shape, volumes: PairVolumes) => RegionValues;

interface Remembered {
  readonly volume: Volume;
  readonly stored: StoredSlice | undefined;
  readonly noise: NoiseOfStack;
  /** The other stack's slice at the shape, and its noise: edges close by are looked for on the sharper. */
  readonly besideStored: StoredSlice | undefined;
  readonly besideNoise: NoiseOfStack | undefined;
  readonly value: RegionValue;
}

/**
 * A measure with a memory: a shape object that was measured on a slice isn't measured on it again, unless the noise of
 * the stack has become known since. Shapes are never changed in place, so the object itself is the key, and the memory
 * goes when the shape goes.
 *
 * @param noiseOf the noise of a stack as it is known now, the same object as long as nothing new is known
 */
export function createMeasureShape(
  isGap: (volume: Volume, index: number) => boolean,
  noiseOf: (volume: Volume) => NoiseOfStack = () => FLAGS.noStandardError,
): MeasureShape {
  const memory = new WeakMap<Shape, Remembered[]>();

  const onVolume = (shape: Shape, volume: Volume, other?: Volume): RegionValue | null => {
    const found = findSlice(shape, volume.stack);
    const index = found.ok ? found.value.sliceIndex : undefined;
    const stored = index === undefined ? undefined : volume.slice(index);
    const known = memory.get(shape) ?? [];
    const noise = noiseOf(volume);
    // A slice that is still to come has no value yet; a gap has one that says why there is none.
    if (index !== undefined && stored === undefined && !isGap(volume, index)) {
      const before = known.find((entry) => entry.volume === volume && entry.stored !== undefined);
      if (before?.noise !== noise) volume.ask(index);
      return before?.value ?? null;
    }
    const besideStored = other && storedAt(shape, other);
    const besideNoise = other && noiseOf(other);
    // The other slice may have been dropped since: what was found on it still holds.
    const same = known.find(
      (entry) =>
        entry.volume === volume &&
        entry.stored === stored &&
        entry.noise === noise &&
        entry.besideNoise === besideNoise &&
        (entry.besideStored === besideStored || besideStored === undefined),
    );
    if (same !== undefined) return same.value;
    const beside = other &&
      besideNoise && {
        stack: other.stack,
        storedOf: (slice: number) => other.slice(slice),
        noise: besideNoise,
      };
    const storedOf = (slice: number) => volume.slice(slice);
    const value = measureRegion(shape, volume.stack, storedOf, noise, beside);
    memory.set(shape, [
      ...known.filter((entry) => entry.volume !== volume),
      { volume, stored, noise, besideStored, besideNoise, value },
    ]);
    return value;
  };

  return (shape, { soft, sharp }) => ({
    soft: onVolume(shape, soft, sharp),
    sharp: sharp === undefined ? null : onVolume(shape, sharp, soft),
  });
}

function storedAt(shape: Shape, volume: Volume): StoredSlice | undefined {
  const found = findSlice(shape, volume.stack);
  return found.ok ? volume.slice(found.value.sliceIndex) : undefined;
}
