import { type NotePair, withRenewedVisibility } from '../../../core/note/index.js';
import type { MeasuredPair } from '../../pairing/measuredPair.js';
import type { AppState, PlateState } from '../appState.js';
import type { Change } from '../store.js';

/** Name of the change that keeps what was measured of the pair. */
export const KEEP_MEASURED = 'Keep the evidence of the pair';

/**
 * Keeps what was measured of the pair on the plates, with its evidence in the note. It is no edit of the reader's, so
 * it can't be undone; a verified note stays as it is. What was measured of another pair is dropped.
 */
export function keepMeasured(measured: MeasuredPair, now: string): Change {
  return (state) => {
    const { pair, note } = state;
    if (pair?.soft.key !== measured.softKey || pair.sharp?.key !== measured.sharpKey) return state;
    const { evidence } = measured;
    const texture = textureOfPair(measured);
    const isDecided = measured.measuredSharpKey === pair.sharp.key;
    const chosenBy = pair.chosenBy === 'order' && isDecided ? 'measure' : pair.chosenBy;
    return {
      ...state,
      assessment: { kind: 'done', measured },
      pair: { ...pair, evidence, chosenBy },
      note:
        note === undefined ||
        note.verification === 'VERIFIED' ||
        isSame(note.pair, evidence, texture)
          ? note
          : withRenewedVisibility({
              ...note,
              changedAt: now,
              pair: { ...note.pair, evidence: [...evidence], texture },
            }),
    };
  };
}

function isSame(pair: NotePair, evidence: unknown, texture: unknown): boolean {
  return JSON.stringify([pair.evidence, pair.texture]) === JSON.stringify([evidence, texture]);
}

/** The textures of the kernels as the plates have them: the pair may have changed places since it was measured. */
function textureOfPair({ softKey, sharpKey, textures }: MeasuredPair): NotePair['texture'] {
  return { soft: textures[softKey] ?? null, sharp: textures[sharpKey] ?? null };
}

/** Gives each plate the place and window that the other one had, after soft and sharp were swapped. */
export function swapPlates(before: AppState['plates']): Change {
  return (state) => {
    const moved = (from: PlateState, to: PlateState): PlateState => ({ ...from, size: to.size });
    const { soft, sharp } = state.plates;
    return {
      ...state,
      plates: { soft: moved(before.sharp, soft), sharp: moved(before.soft, sharp) },
    };
  };
}

/** Gives both plates the places and windows that they had, after the same stacks were shown anew. */
export function samePlaces(before: AppState['plates']): Change {
  return (state) => {
    const { soft, sharp } = state.plates;
    return {
      ...state,
      plates: {
        soft: { ...before.soft, size: soft.size },
        sharp: { ...before.sharp, size: sharp.size },
      },
    };
  };
}
