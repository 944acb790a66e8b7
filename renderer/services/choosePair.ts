import type { Note, PairOverride } from '../../core/note/index.js';
import { selectStack } from '../../core/note/index.js';
import { isUnscaled, type Stack } from '../../core/stack/index.js';
import type { Proposal } from '../pairing/proposal.js';

/** Two stacks, or one alone, that could be shown. */
export interface Candidate {
  readonly soft: Stack;
  readonly sharp: Stack | undefined;
  /** What the reader answers for although the files differ in it. */
  readonly overrides?: readonly PairOverride[];
}

/** Study Instance UIDs of the stacks, each once, in the order of the stacks. */
export function studiesOf(stacks: readonly Stack[]): readonly string[] {
  return [...new Set(stacks.map(studyOf))];
}

export function studyOf(stack: Stack): string {
  return stack.slices[0].image.identity.studyInstanceUid;
}

/**
 * What a folder shows without asking: its only stack, or its only two stacks of one study in the order of their
 * series numbers. Which is the softer is not known then, since labels are never interpreted; the reader looks.
 * Undefined when there is a choice to make.
 */
export function candidateByOrder(stacks: readonly Stack[]): Candidate | undefined {
  // Those without a pixel spacing are shown only where there is nothing else.
  const scaled = stacks.filter((stack) => !isUnscaled(stack));
  const offered = scaled.length > 0 ? scaled : stacks;
  const [first, second] = offered.toSorted(bySeries);
  if (first === undefined || offered.length > 2) return undefined;
  if (second !== undefined && isUnscaled(second)) return undefined;
  if (second === undefined) return { soft: first, sharp: undefined };
  return studyOf(first) === studyOf(second) ? { soft: first, sharp: second } : undefined;
}

function bySeries(a: Stack, b: Stack): number {
  const number = (stack: Stack): number =>
    stack.slices[0].image.acquisition.seriesNumber ?? Number.POSITIVE_INFINITY;
  const [x, y] = [number(a), number(b)];
  return x === y ? a.key.localeCompare(b.key) : x < y ? -1 : 1;
}

/** The stacks that a note was made on; undefined when the folder does not have them, or not surely. */
export function candidateOfNote(note: Note, stacks: readonly Stack[]): Candidate | undefined {
  const soft = selectStack(note.pair.soft, stacks);
  if (!soft.ok) return undefined;
  if (note.pair.sharp === null) return { soft: soft.value, sharp: undefined };
  const sharp = selectStack(note.pair.sharp, stacks);
  if (!sharp.ok) return undefined;
  const { overrides } = note.pair;
  return {
    soft: soft.value,
    sharp: sharp.value,
    ...(overrides.length > 0 && { overrides }),
  };
}

/** The stacks of a proposal; undefined when the folder does not have them. */
export function candidateOfProposal(
  { softKey, sharpKey }: Proposal,
  stacks: readonly Stack[],
): Candidate | undefined {
  const soft = stacks.find(({ key }) => key === softKey);
  const sharp = stacks.find(({ key }) => key === sharpKey);
  return soft && sharp && { soft, sharp };
}
