import {
  anySynthetic,
  createNote,
  type Note,
  noteConditions,
  notePair,
  noteStudy,
} from '../../core/note/index.js';
import type { PairState } from '../state/appState.js';

export interface NoteSetting {
  readonly pair: PairState;
  readonly reader: string;
  readonly version: string;
  readonly now: string;
  readonly newId: () => string;
}

/** A new note of the pair, or the kept one brought to it. */
export function beginNote(kept: Note | undefined, setting: NoteSetting): Note {
  const { pair, reader, version, now, newId } = setting;
  const described = {
    pair: notePair(pair.soft, pair.sharp, pair),
    conditions: noteConditions(pair.soft, pair.sharp),
    synthetic: anySynthetic(pair.soft, pair.sharp),
  };
  if (kept === undefined) {
    return createNote({
      id: newId(),
      now,
      reader,
      software: { name: 'Diptych', version },
      study: noteStudy(pair.soft),
      ...described,
    });
  }
  if (isSamePair(kept, pair)) return kept;
  // Values of another stack would be wrong under this one's name: they go, and are measured anew.
  return {
    ...kept,
    ...described,
    verification: 'UNVERIFIED',
    changedAt: now,
    regions: kept.regions.map((region) => ({ ...region, soft: null, sharp: null })),
    contrasts: kept.contrasts.map((contrast) => ({ ...contrast, soft: null, sharp: null })),
  };
}

function isSamePair({ pair: kept }: Note, { soft, sharp }: PairState): boolean {
  return kept.soft.key === soft.key && (kept.sharp?.key ?? undefined) === sharp?.key;
}
