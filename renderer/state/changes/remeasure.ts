import {
  type Note,
  type NoteRegion,
  type RegionValues,
  withValues,
} from '../../../core/note/index.js';
import type { RegionValue } from '../../../core/region/index.js';

/** A value that a saved note had and that the images no longer give. */
export interface ChangedValue {
  readonly label: string;
  readonly kernel: 'soft' | 'sharp';
  readonly beforeHu: number;
  readonly nowHu: number | null;
}

/** A mean that differs by more than this is another mean and not rounding, HU. */
const SAME_HU = 1e-6;

/**
 * The note with every region measured that can be measured now. What is still waiting for its slice keeps the
 * value that it has. The same note comes back when no value has changed, so that nothing is saved in vain.
 */
export function remeasured(
  note: Note,
  measure: (region: NoteRegion) => RegionValues,
  now: string,
): { readonly note: Note; readonly changed: readonly ChangedValue[] } {
  const kept = (region: NoteRegion): RegionValues => {
    const values = measure(region);
    return { soft: values.soft ?? region.soft, sharp: values.sharp ?? region.sharp };
  };
  const fresh = new Map(note.regions.map((region) => [region.id, kept(region)]));
  const differs = note.regions.some((region) => {
    const values = fresh.get(region.id);
    return !sameValue(values?.soft, region.soft) || !sameValue(values?.sharp, region.sharp);
  });
  if (!differs) return { note, changed: [] };
  const valuesOf = (region: NoteRegion): RegionValues => fresh.get(region.id) ?? region;
  return {
    note: withValues(note, valuesOf, now),
    changed: note.regions.flatMap((region) => changedValues(region, valuesOf(region))),
  };
}

function changedValues(region: NoteRegion, values: RegionValues): readonly ChangedValue[] {
  return (['soft', 'sharp'] as const).flatMap((kernel) => {
    const beforeHu = region[kernel]?.meanHu ?? null;
    const nowHu = values[kernel]?.meanHu ?? null;
    if (beforeHu === null) return [];
    if (nowHu !== null && Math.abs(nowHu - beforeHu) <= SAME_HU) return [];
    return [{ label: region.label, kernel, beforeHu, nowHu }];
  });
}

function sameValue(a: RegionValue | null | undefined, b: RegionValue | null | undefined): boolean {
  return a === b || JSON.stringify(a) === JSON.stringify(b);
}
