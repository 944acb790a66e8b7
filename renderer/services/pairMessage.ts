import { isUnscaled } from '../../core/stack/index.js';
import type { Message, PairState } from '../state/appState.js';

/** What the reader is told when a pair comes on the plates; undefined when all is plain. */
export function pairMessage(pair: PairState): Message | undefined {
  if (isUnscaled(pair.soft)) {
    return {
      tone: 'warning',
      text: 'The files of this stack have no pixel spacing: it can be looked at, and nothing is measured on it.',
    };
  }
  if (pair.sharp === undefined) return { tone: 'plain', text: 'One stack alone is read.' };
  if (pair.link === 'index') {
    return {
      tone: 'warning',
      text: 'Positions of these two stacks can’t be compared. The plates are linked by slice number, and regions are measured on the soft one only.',
    };
  }
  if (pair.chosenBy === 'order') {
    return {
      tone: 'warning',
      text: 'Soft and sharp were chosen by the order of their series numbers. Please check, and swap them with Pair… if they are the other way round.',
    };
  }
  return undefined;
}
