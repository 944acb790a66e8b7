import type { MeasuredPlan } from '../measurePlan.js';
import type { FrameDigest, Kernel, Note, NoteRegion } from '../schema.js';
import { frameKey, type ReferencedFrame } from './frameDigests.js';
import { changedEdgeNumbers } from './recheckEdges.js';
import { changedProfileNumbers } from './recheckProfiles.js';
import { changedStentNumbers } from './recheckStents.js';
import { isSameNumber } from './sameNumber.js';

/** A number of the note that the images no longer give. */
export interface ChangedNumber {
  readonly id: string;
  readonly label: string;
  /** 'both' for one result of both kernels at once: a fitted stent. */
  readonly kernel: Kernel | 'both';
  /** Name of the number as the note has it: 'meanHu'; 'cnr' of a contrast. */
  readonly quantity: string;
  readonly before: number | null;
  readonly now: number | null;
  /** The image that it was measured on; null for a contrast, for both kernels at once, and on an oblique cut. */
  readonly sopInstanceUid: string | null;
}

/** A frame whose pixels are not those that the note was made from, or that is not to be had. */
export interface ChangedFrame extends ReferencedFrame {
  readonly state: 'missing' | 'changed';
}

/** What recomputing may alter by rounding, relative to the number. */
const RELATIVE_ROUNDING = 1e-9;
/** The noise is a sum over many areas, and which stack comes first may turn its last digits. */
const RELATIVE_ROUNDING_OF_NOISE = 1e-6;

/** The numbers of a region that the pixels and the shape alone decide, and those that the pair's noise decides too. */
const QUANTITIES = [
  'n',
  'meanHu',
  'sdHu',
  'minHu',
  'maxHu',
  'medianHu',
  'areaMm2',
  'sampledAreaMm2',
  'snr',
  'standardErrorHu',
  'placementHu',
] as const;

/** Every number of a note's measurements that a fresh measurement does not give again, in the note's order. */
export function changedNumbers(note: Note, measured: MeasuredPlan): readonly ChangedNumber[] {
  const regions = new Map(measured.regions.map((region) => [region.id, region]));
  const contrasts = new Map(measured.contrasts.map((contrast) => [contrast.id, contrast]));
  return [
    ...note.regions.flatMap((region) =>
      kernelsOf(note).flatMap((kernel) =>
        ofRegion(region, kernel, regions.get(region.id)?.[kernel] ?? null),
      ),
    ),
    ...note.contrasts.flatMap((contrast) =>
      kernelsOf(note).flatMap((kernel): readonly ChangedNumber[] => {
        const [before, now] = [contrast[kernel], contrasts.get(contrast.id)?.[kernel] ?? null];
        if (isSameNumber(before, now, RELATIVE_ROUNDING)) return [];
        const { id } = contrast;
        return [
          {
            id,
            label: `Contrast ${id}`,
            kernel,
            quantity: 'cnr',
            before,
            now,
            sopInstanceUid: null,
          },
        ];
      }),
    ),
    ...changedEdgeNumbers(note, measured),
    ...changedProfileNumbers(note, measured),
    ...changedStentNumbers(note, measured),
  ];
}

function ofRegion(
  region: NoteRegion,
  kernel: Kernel,
  fresh: NoteRegion[Kernel],
): readonly ChangedNumber[] {
  const kept = region[kernel];
  if (kept === null) return [];
  const { id, label } = region;
  return QUANTITIES.flatMap((quantity): readonly ChangedNumber[] => {
    const [before, now] = [kept[quantity], fresh?.[quantity] ?? null];
    const rounding =
      quantity === 'standardErrorHu' ? RELATIVE_ROUNDING_OF_NOISE : RELATIVE_ROUNDING;
    if (isSameNumber(before, now, rounding)) return [];
    return [{ id, label, kernel, quantity, before, now, sopInstanceUid: kept.sopInstanceUid }];
  });
}

/**
 * Frames of the note that are not there, and those whose pixels are others.
 *
 * @param found digest of each frame that could be read, by {@link frameKey}
 */
export function changedFrames(
  frames: readonly FrameDigest[],
  found: ReadonlyMap<string, string>,
): readonly ChangedFrame[] {
  return frames.flatMap(({ sopInstanceUid, frameNumber, sha256 }): readonly ChangedFrame[] => {
    const now = found.get(frameKey({ sopInstanceUid, frameNumber }));
    if (now === sha256) return [];
    return [{ sopInstanceUid, frameNumber, state: now === undefined ? 'missing' : 'changed' }];
  });
}

function kernelsOf({ pair }: Note): readonly Kernel[] {
  return pair.sharp === null ? ['soft'] : ['soft', 'sharp'];
}
