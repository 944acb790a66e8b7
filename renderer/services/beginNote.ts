import {
  anySynthetic,
  createNote,
  type Note,
  type NoteStack,
  noteConditions,
  notePair,
  noteStudy,
} from '../../core/note/index.js';
import type { Stack } from '../../core/stack/index.js';
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
  if (isSamePair(kept, pair)) {
    const isAnsweredAlike = JSON.stringify(kept.pair.overrides) === JSON.stringify(pair.overrides);
    if (isAnsweredAlike || kept.verification === 'VERIFIED') return kept;
    return { ...kept, changedAt: now, pair: { ...kept.pair, overrides: [...pair.overrides] } };
  }
  // Values of another stack would be wrong under this one's name: they go, and are measured anew.
  return {
    ...kept,
    ...described,
    verification: 'UNVERIFIED',
    changedAt: now,
    regions: kept.regions.map((region) => ({ ...region, soft: null, sharp: null })),
    contrasts: kept.contrasts.map((contrast) => ({ ...contrast, soft: null, sharp: null })),
    edges: kept.edges.map((edge) => ({ ...edge, soft: null, sharp: null })),
    profiles: kept.profiles.map((profile) => ({ ...profile, soft: null, sharp: null })),
    stents: kept.stents.map((stent) => ({ ...stent, fit: null })),
  };
}

/** The same stacks, masked and linked alike: what is linked by number alone is not measured on the sharp stack. */
function isSamePair({ pair: kept }: Note, { soft, sharp, link }: PairState): boolean {
  const isSame = (of: NoteStack | null, stack: Stack | undefined): boolean =>
    of?.key === stack?.key && of?.maskedBelowHu === stack?.maskedBelowHu;
  return isSame(kept.soft, soft) && isSame(kept.sharp, sharp) && kept.link === link;
}
