import { bandTable } from '../../plaque/index.js';
import type { Density, Note } from '../schema.js';
import type { ChangedNumber } from './recheck.js';

/** Every count of a note's density bands that the pixels do not give again, in the note's order. */
export function changedDensities(note: Note, fresh: readonly Density[]): readonly ChangedNumber[] {
  return note.densities.flatMap((kept) => {
    const now = fresh.find(({ regionId }) => regionId === kept.regionId);
    const region = note.regions.find(({ id }) => id === kept.regionId);
    const names = bandTable(kept.table)?.bands.map(({ name }) => name) ?? [];
    const counts: readonly (readonly [string, number, number | undefined])[] = [
      ...kept.pixels.map(
        (count, band) => [names[band] ?? `band ${band + 1}`, count, now?.pixels[band]] as const,
      ),
      ['no band', kept.unassigned, now?.unassigned],
    ];
    return counts.flatMap(([band, before, count]): readonly ChangedNumber[] =>
      count === before
        ? []
        : [
            {
              id: kept.regionId,
              label: region?.label ?? kept.regionId,
              kernel: 'soft',
              quantity: `pixels of ${band}`,
              before,
              now: count ?? null,
              sopInstanceUid: region?.soft?.sopInstanceUid ?? null,
            },
          ],
    );
  });
}
