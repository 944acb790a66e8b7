import {
  type BandLine,
  FLAGS,
  findLineSlice,
  type NoiseOfStack,
  type StoredOf,
} from '../../core/region/index.js';
import type { Stack } from '../../core/stack/index.js';
import type { PairVolumes } from './loadPair.js';
import type { StoredSlice, Volume } from './volume.js';

/** What a line measures on one stack. */
export type MeasureOnStack<L extends BandLine, V> = (
  line: L,
  stack: Stack,
  storedOf: StoredOf,
  noise: NoiseOfStack,
) => V;

/** What a line measures on both stacks; null on a stack whose slice is still to come. */
export interface LineValues<V> {
  readonly soft: V | null;
  readonly sharp: V | null;
}

interface Remembered<L, V> {
  readonly line: L;
  readonly volume: Volume;
  readonly stored: StoredSlice | undefined;
  readonly noise: NoiseOfStack;
  readonly value: V;
}

/**
 * A measure of lines with a memory: what was measured on a slice isn't measured on it again, also when the slice was
 * dropped since. A line's start is never changed in place, so that it is the key.
 *
 * @param isSame whether two lines of one start and end measure the same
 * @param noiseOf the noise of a stack, the same object as long as nothing new is known
 */
export function createMeasureLine<L extends BandLine, V>(
  measureOn: MeasureOnStack<L, V>,
  isGap: (volume: Volume, index: number) => boolean,
  isSame: (a: L, b: L) => boolean = (a, b) => a.bandMm === b.bandMm,
  noiseOf: (volume: Volume) => NoiseOfStack = () => FLAGS.noStandardError,
): (line: L, volumes: PairVolumes) => LineValues<V> {
  const memory = new WeakMap<BandLine['fromMm'], readonly Remembered<L, V>[]>();

  const onVolume = (line: L, volume: Volume): V | null => {
    const found = findLineSlice(line, volume.stack);
    const index = found.ok ? found.value.sliceIndex : undefined;
    const stored = index === undefined ? undefined : volume.slice(index);
    const known = (memory.get(line.fromMm) ?? []).filter(
      (entry) => entry.line.toMm === line.toMm && isSame(entry.line, line),
    );
    const here = known.filter((entry) => entry.volume === volume);
    if (index !== undefined && stored === undefined && !isGap(volume, index)) {
      const before = here.find((entry) => entry.stored !== undefined);
      if (before === undefined) volume.ask(index);
      return before?.value ?? null;
    }
    const noise = noiseOf(volume);
    const same = here.find((entry) => entry.stored === stored && entry.noise === noise);
    if (same !== undefined) return same.value;
    const value = measureOn(line, volume.stack, (slice) => volume.slice(slice), noise);
    memory.set(line.fromMm, [
      ...known.filter((entry) => entry.volume !== volume),
      { line, volume, stored, noise, value },
    ]);
    return value;
  };

  return (line, { soft, sharp }) => ({
    soft: onVolume(line, soft),
    sharp: sharp === undefined ? null : onVolume(line, sharp),
  });
}
