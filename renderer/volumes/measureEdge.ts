import type { EdgeValues } from '../../core/note/index.js';
import {
  type BandLine,
  type EdgeValue,
  findLineSlice,
  measureEdgeLine,
} from '../../core/region/index.js';
import type { PairVolumes } from './loadPair.js';
import type { StoredSlice, Volume } from './volume.js';

/** Measures edge lines on both stacks; null on a stack whose slice is still to come. */
export type MeasureEdge = (line: BandLine, volumes: PairVolumes) => EdgeValues;

interface Remembered {
  readonly line: BandLine;
  readonly volume: Volume;
  readonly stored: StoredSlice | undefined;
  readonly value: EdgeValue;
}

/**
 * A measure with a memory: what was measured on a slice isn't measured on it again, also when the slice was dropped
 * since. A line's start is never changed in place, so that it is the key.
 */
export function createMeasureEdge(isGap: (volume: Volume, index: number) => boolean): MeasureEdge {
  const memory = new WeakMap<BandLine['fromMm'], readonly Remembered[]>();

  const onVolume = (line: BandLine, volume: Volume): EdgeValue | null => {
    const found = findLineSlice(line, volume.stack);
    const index = found.ok ? found.value.sliceIndex : undefined;
    const stored = index === undefined ? undefined : volume.slice(index);
    const known = (memory.get(line.fromMm) ?? []).filter(
      (entry) => entry.line.toMm === line.toMm && entry.line.bandMm === line.bandMm,
    );
    const here = known.filter((entry) => entry.volume === volume);
    if (index !== undefined && stored === undefined && !isGap(volume, index)) {
      const before = here.find((entry) => entry.stored !== undefined);
      if (before === undefined) volume.ask(index);
      return before?.value ?? null;
    }
    const same = here.find((entry) => entry.stored === stored);
    if (same !== undefined) return same.value;
    const value = measureEdgeLine(line, volume.stack, (slice) => volume.slice(slice));
    memory.set(line.fromMm, [
      ...known.filter((entry) => entry.volume !== volume),
      { line, volume, stored, value },
    ]);
    return value;
  };

  return (line, { soft, sharp }) => ({
    soft: onVolume(line, soft),
    sharp: sharp === undefined ? null : onVolume(line, sharp),
  });
}
