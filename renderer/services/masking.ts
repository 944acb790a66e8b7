import { LOWEST_IMAGE_HU } from '../../core/intensity/index.js';
import { type Result, success } from '../../core/result.js';
import { type Stack, withMaskedPadding } from '../../core/stack/index.js';
import type { PairState } from '../state/appState.js';
import type { Candidate } from './choosePair.js';

/** Whether the values that no file marks as padding are left out of the pair. */
export function isMasked({ soft }: Pick<PairState, 'soft'>): boolean {
  return soft.maskedBelowHu !== undefined;
}

/**
 * The same two stacks with the values that are no image left out, or, where they are, as the folder has them. Both or
 * neither: the kernels would not be measured alike otherwise. Refused where one of them can't be masked.
 */
export function withMaskTurned(pair: PairState, stacks: readonly Stack[]): Result<Candidate> {
  const { soft, sharp, overrides } = pair;
  const asRead = (stack: Stack): Stack => stacks.find(({ key }) => key === stack.key) ?? stack;
  if (isMasked(pair)) {
    return success({ soft: asRead(soft), sharp: sharp && asRead(sharp), overrides });
  }
  const maskedSoft = withMaskedPadding(soft, LOWEST_IMAGE_HU);
  if (!maskedSoft.ok) return maskedSoft;
  if (sharp === undefined) return success({ soft: maskedSoft.value, sharp, overrides });
  const maskedSharp = withMaskedPadding(sharp, LOWEST_IMAGE_HU);
  if (!maskedSharp.ok) return maskedSharp;
  return success({ soft: maskedSoft.value, sharp: maskedSharp.value, overrides });
}

/** A choice of stacks as the pair on the plates has them: choosing them again does not take back what was left out. */
export function asOnPlates(candidate: Candidate, pair: PairState | undefined): Candidate {
  const shown = [pair?.soft, pair?.sharp];
  const both = [candidate.soft, candidate.sharp].map((stack) =>
    shown.find((one) => one?.key === stack?.key),
  );
  const [soft, sharp] = both;
  // Where one of them is another stack, the choice is a new one for both.
  if (soft === undefined || (candidate.sharp !== undefined && sharp === undefined)) {
    return candidate;
  }
  return { ...candidate, soft, sharp: candidate.sharp && sharp };
}
