import type { RegionValues } from '../../core/note/index.js';
import { findSlice, measureRegion, type RegionValue, type Shape } from '../../core/region/index.js';
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
  readonly value: RegionValue;
}

/**
 * A measure with a memory: a shape object that was measured on a slice isn't measured on it again. Shapes are
 * never changed in place, so the object itself is the key, and the memory goes when the shape goes.
 */
export function createMeasureShape(
  isGap: (volume: Volume, index: number) => boolean,
): MeasureShape {
  const memory = new WeakMap<Shape, Remembered[]>();

  const onVolume = (shape: Shape, volume: Volume): RegionValue | null => {
    const found = findSlice(shape, volume.stack);
    const index = found.ok ? found.value.sliceIndex : undefined;
    const stored = index === undefined ? undefined : volume.slice(index);
    const known = memory.get(shape) ?? [];
    // A slice that is still to come has no value yet; a gap has one that says why there is none.
    if (index !== undefined && stored === undefined && !isGap(volume, index)) {
      const before = known.find((entry) => entry.volume === volume && entry.stored !== undefined);
      if (before === undefined) volume.ask(index);
      return before?.value ?? null;
    }
    const same = known.find((entry) => entry.volume === volume && entry.stored === stored);
    if (same !== undefined) return same.value;
    const value = measureRegion(shape, volume.stack, (slice) => volume.slice(slice));
    memory.set(shape, [
      ...known.filter((entry) => entry.volume !== volume),
      { volume, stored, value },
    ]);
    return value;
  };

  return (shape, { soft, sharp }) => ({
    soft: onVolume(shape, soft),
    sharp: sharp === undefined ? null : onVolume(shape, sharp),
  });
}
