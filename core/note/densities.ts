import type { StoredValues } from '../dicom/index.js';
import { bandCautions, bandShares, bandTable, spillShare } from '../plaque/index.js';
import { findSlice, type NoiseOfStack, regionValues, statistics } from '../region/index.js';
import type { Stack } from '../stack/index.js';
import type { Density, Note, NoteRegion } from './schema.js';
import { touched } from './touched.js';

/** The soft stack, its pixels, and its blur where that is known. */
export interface DensitySource {
  readonly soft: Stack;
  readonly storedOf: (sliceIndex: number) => StoredValues | undefined;
  readonly noise: NoiseOfStack;
}

/**
 * Bands of every plaque region of a note on the soft kernel, in the note's order. A region whose slice is not there
 * keeps what the note has of it; one that can't be measured has none.
 */
export function measuredDensities(note: Note, source: DensitySource): readonly Density[] {
  const table = bandTable(note.bandTable);
  if (table === undefined || source.soft.unit !== 'HU') return [];
  return (
    note.regions
      // Bands were published for slices: on an oblique cut noise and partial volume are others.
      .filter(({ role, plane }) => role === 'plaque' && plane === undefined)
      .flatMap((region): readonly Density[] => {
        const found = findSlice(region.shape, source.soft);
        if (!found.ok) return [];
        const { sliceIndex } = found.value;
        const slice = source.soft.slices[sliceIndex];
        const stored = source.storedOf(sliceIndex);
        if (slice === undefined || stored === undefined) {
          return note.densities.filter((kept) => kept.regionId === region.id);
        }
        const { values } = regionValues(region.shape, slice, stored);
        const [down, across] = slice.image.grid.pixelSpacingMm;
        const { median } = statistics(values);
        const lumenHu = lumenBeside(note, region);
        const blurMm = 'code' in source.noise ? null : source.noise.blurFwhmMm;
        const spill =
          median === undefined || lumenHu === null || blurMm === null
            ? null
            : spillShare(region.shape, slice, stored, { medianHu: median, lumenHu, blurMm });
        const conditions = { kvp: note.conditions.kvp, kernel: 'soft', spillShare: spill } as const;
        return [
          {
            regionId: region.id,
            table: table.id,
            ...bandShares(values, table, across * down),
            flags: [...bandCautions(table, conditions)],
          },
        ];
      })
  );
}

/** Mean of the lumen that a plaque lies beside: one of the same finding, else the one that a contrast ties it to. */
function lumenBeside(note: Note, plaque: NoteRegion): number | null {
  const lumens = note.regions.filter(({ role }) => role === 'lumen');
  const own =
    lumens.find(({ findingId }) => findingId !== null && findingId === plaque.findingId) ??
    lumens.find(({ id }) =>
      note.contrasts.some(({ lumen, wall }) => lumen === id && wall === plaque.id),
    );
  return own?.soft?.meanHu ?? null;
}

/** The note with these densities; the same note where nothing differs, so that nothing is saved in vain. */
export function withDensities(note: Note, densities: readonly Density[], now: string): Note {
  return JSON.stringify(note.densities) === JSON.stringify(densities)
    ? note
    : touched(note, { densities }, now);
}

/** Chooses the table of bands for the whole note. Unknown identifiers leave the note as it is. */
export function chooseBands(note: Note, table: string, now: string): Note {
  if (bandTable(table) === undefined || note.bandTable === table) return note;
  return touched(note, { bandTable: table, densities: [] }, now);
}
