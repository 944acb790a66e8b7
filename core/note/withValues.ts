import { recomputedContrasts } from './contrasts.js';
import type { RegionValues } from './regions.js';
import type { Note, NoteRegion } from './schema.js';
import { touched } from './touched.js';

/** The note with every region measured anew and every contrast computed from the new values. */
export function withValues(
  note: Note,
  measure: (region: NoteRegion) => RegionValues,
  now: string,
): Note {
  const measured = touched(
    note,
    { regions: note.regions.map((region) => ({ ...region, ...measure(region) })) },
    now,
  );
  return { ...measured, contrasts: recomputedContrasts(measured) };
}
