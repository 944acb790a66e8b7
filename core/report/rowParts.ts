import type { Kernel, Note, NoteFinding, NoteStack } from '../note/schema.js';
import { segmentOf } from '../note/segments.js';
import { type Flag, isQuiet } from '../region/index.js';
import type { KernelValues, TableRow } from './tableRow.js';

/** A stack of the pair, under its kernel. */
export interface KernelStack {
  readonly kernel: Kernel;
  readonly stack: NoteStack;
}

/** The stacks of a note's pair, soft first. */
export function kernelsOf({ pair }: Pick<Note, 'pair'>): readonly KernelStack[] {
  return [
    { kernel: 'soft', stack: pair.soft },
    ...(pair.sharp === null ? [] : [{ kernel: 'sharp' as const, stack: pair.sharp }]),
  ];
}

/** Where a value lies, as every measurement of the note says it. */
interface PlacedValue {
  readonly sliceIndex: number | null;
  readonly sliceOffsetMm: number | null;
  readonly sopInstanceUid: string | null;
  readonly frameNumber: number | null;
  readonly flags: readonly Flag[];
}

/** Kernel, place and flags of a value of one kernel; a value that is not there says so. */
export function kernelCells(
  { kernel, stack }: KernelStack,
  value: PlacedValue | null,
): Omit<KernelValues, 'quoted' | 'quantities'> {
  const sliceIndex = value?.sliceIndex ?? null;
  return {
    kernel,
    kernelLabel: stack.kernelLabel,
    seriesInstanceUid: stack.seriesInstanceUid,
    sliceIndex,
    slices: stack.slices,
    // On an oblique cut it would be the distance from the cut, which is no slice.
    sliceOffsetMm: sliceIndex === null ? null : (value?.sliceOffsetMm ?? null),
    sopInstanceUid: value?.sopInstanceUid ?? null,
    frameNumber: value?.frameNumber ?? null,
    flags: value === null ? ['Not measured on this kernel.'] : spoken(value.flags),
  };
}

type FindingCells = Pick<
  TableRow,
  'segment' | 'finding' | 'nominalMm' | 'assessability' | 'reason'
>;

/** What a row says of the finding that it belongs to; all empty for none. */
export function findingCells(finding: NoteFinding | undefined): FindingCells {
  const segment = segmentOf(finding?.segment ?? null);
  return {
    segment: segment === undefined ? '' : `${segment.number} ${segment.abbreviation}`,
    finding: finding?.kind ?? '',
    nominalMm: finding?.nominalMm ?? null,
    assessability: finding?.assessability ?? '',
    reason: finding?.reason ?? '',
  };
}

/** Flags in words, but for those that hold for every value alike and are said once. */
export function spoken(flags: readonly Flag[]): readonly string[] {
  return flags.filter((flag) => !isQuiet(flag)).map(({ text }) => text);
}
