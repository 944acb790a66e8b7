import { distance } from '../geometry/index.js';
import { type RegionValue, shapeCentre } from '../region/index.js';
import type { Kernel, Note, NoteRegion, Repeat } from './schema.js';

/** One region read twice. */
export interface TwiceRead {
  readonly label: string;
  readonly first: Readonly<Record<Kernel, RegionValue | null>>;
  readonly second: Readonly<Record<Kernel, RegionValue | null>>;
}

/** Two readings of the same regions, and who made them. */
export interface ReadingPair {
  readonly firstName: string;
  readonly secondName: string;
  readonly regions: readonly TwiceRead[];
  /** What has no counterpart, a sentence each. */
  readonly unmatched: readonly string[];
}

/** Numbers that can be compared between readings. */
export const COMPARED = {
  meanHu: { name: 'mean', unit: 'HU' },
  sdHu: { name: 'SD', unit: 'HU' },
  snr: { name: 'SNR', unit: '' },
  areaMm2: { name: 'area', unit: 'mm²' },
} as const;

export type Compared = keyof typeof COMPARED;

/** A note's first reading against a repeat of it. */
export function readingsOfRepeat(note: Note, repeat: Repeat): ReadingPair {
  const again = new Map(repeat.regions.map((region) => [region.regionId, region]));
  const read = note.regions.flatMap((region): readonly TwiceRead[] => {
    const second = again.get(region.id);
    return second === undefined ? [] : [{ label: region.label, first: region, second }];
  });
  return {
    firstName: `first reading${named(note.reader)}`,
    secondName: `repeat ${repeat.id}${named(repeat.reader)}`,
    regions: read,
    unmatched: note.regions
      .filter(({ id }) => !again.has(id))
      .map(({ label }) => `${label} was not drawn again.`),
  };
}

/**
 * Two readers' notes of one study: regions of one role in one finding (segment and kind) belong together, of several
 * the nearest first. What one of them alone has is told.
 */
export function readingsOfNotes(first: Note, second: Note): ReadingPair {
  const candidates = first.regions.flatMap((a) =>
    second.regions
      .filter((b) => a.role === b.role && placeKey(first, a) === placeKey(second, b))
      .map((b) => ({ a, b, apartMm: distance(shapeCentre(a.shape), shapeCentre(b.shape)) })),
  );
  const taken = new Set<NoteRegion>();
  const regions: TwiceRead[] = [];
  for (const { a, b } of candidates.toSorted((one, other) => one.apartMm - other.apartMm)) {
    if (taken.has(a) || taken.has(b)) continue;
    taken.add(a).add(b);
    const label = a.label === b.label ? a.label : `${a.label} and ${b.label}`;
    regions.push({ label, first: a, second: b });
  }
  const alone = (note: Note, whose: string): readonly string[] =>
    note.regions
      .filter((region) => !taken.has(region))
      .map(({ label }) => `${label} of ${whose} has no counterpart.`);
  const [firstName, secondName] = [
    readerName(first, 'this note'),
    readerName(second, 'the other note'),
  ];
  return {
    firstName,
    secondName,
    regions,
    unmatched: [...alone(first, firstName), ...alone(second, secondName)],
  };
}

/** Values of one number on one kernel of the regions that have it in both readings. */
export function pairedValues(
  { regions }: ReadingPair,
  kernel: Kernel,
  compared: Compared,
): {
  readonly labels: readonly string[];
  readonly first: readonly number[];
  readonly second: readonly number[];
} {
  const both = regions.flatMap(({ label, first, second }) => {
    const [a, b] = [first[kernel]?.[compared] ?? null, second[kernel]?.[compared] ?? null];
    return a === null || b === null ? [] : [{ label, a, b }];
  });
  return {
    labels: both.map(({ label }) => label),
    first: both.map(({ a }) => a),
    second: both.map(({ b }) => b),
  };
}

function named(reader: string): string {
  return reader.trim() === '' ? '' : ` by ${reader}`;
}

function readerName({ reader }: Note, otherwise: string): string {
  return reader.trim() === '' ? otherwise : reader;
}

function placeKey(note: Note, { findingId }: NoteRegion): string {
  const finding = note.findings.find(({ id }) => id === findingId);
  return finding === undefined ? '' : `${finding.segment ?? ''} ${finding.kind}`;
}
