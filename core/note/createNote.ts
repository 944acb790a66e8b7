import type { Stack } from '../stack/index.js';
import { noteStack } from './noteStack.js';
import type { Conditions, Evidence, Link, Note, NotePair, PairOverride, Study } from './schema.js';

/** What a new note begins with. The caller gives clock and identifier, so that the same input makes the same note. */
export interface NoteBeginning {
  readonly id: string;
  /** ISO 8601. */
  readonly now: string;
  readonly reader: string;
  readonly software: { readonly name: string; readonly version: string };
  readonly study: Study;
  readonly pair: NotePair;
  readonly conditions: Conditions;
  /** True when one of the stacks says that it is synthetic. */
  readonly synthetic: boolean;
}

/** A note with nothing measured yet. New contrasts take the SD of a reference region as their noise. */
export function createNote(beginning: NoteBeginning): Note {
  const { id, now, reader, software, study, pair, conditions, synthetic } = beginning;
  return {
    format: 'diptych-note',
    version: 1,
    id,
    software,
    createdAt: now,
    changedAt: now,
    reader,
    completion: 'PARTIAL',
    verification: 'UNVERIFIED',
    synthetic,
    study,
    pair,
    conditions,
    conditionsByReader: [],
    bandTable: 'six-classes',
    densities: [],
    anatomy: { dominance: null, absentSegments: [] },
    noise: 'reference',
    findings: [],
    regions: [],
    contrasts: [],
    edges: [],
    profiles: [],
    stents: [],
    planes: [],
    repeats: [],
    visibility: null,
    lastNumbers: {},
    comment: '',
    frames: [],
    seal: null,
    amendments: [],
  };
}

/** The pair as a note keeps it: both stacks, how they are linked, and the evidence. */
export function notePair(
  soft: Stack,
  sharp: Stack | undefined,
  {
    link,
    evidence,
    overrides = [],
  }: {
    readonly link: Link;
    readonly evidence: readonly Evidence[];
    readonly overrides?: readonly PairOverride[];
  },
): NotePair {
  return {
    soft: noteStack(soft),
    sharp: sharp === undefined ? null : noteStack(sharp),
    link,
    evidence,
    overrides,
    texture: { soft: null, sharp: null },
  };
}

/** True when any slice of the stacks says that it is synthetic. */
export function anySynthetic(...stacks: readonly (Stack | undefined)[]): boolean {
  return stacks.some((stack) => stack?.slices.some(({ image }) => image.synthetic) ?? false);
}
