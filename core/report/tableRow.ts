import type { Kernel } from '../note/schema.js';
import type { QuantityValue } from './quantityDefinition.js';
import type { QuoteCells } from './quoteCells.js';

/** What a row of the table is. */
export type RowItem = 'region' | 'contrast' | 'edge line' | 'profile' | 'fitted stent';

/** The kernel that values are from; 'both' for one result of both kernels at once. */
export type ValuesKernel = Kernel | 'both';

/** Something of the note, with what it came to on each kernel of the pair. */
export interface TableRow {
  readonly item: RowItem;
  readonly id: string;
  readonly label: string;
  readonly role: string;
  /** '7 mLAD'; empty for none. */
  readonly segment: string;
  readonly finding: string;
  readonly nominalMm: number | null;
  readonly assessability: string;
  readonly reason: string;
  /** Where it lies in words; of what lies on an oblique cut it says so. */
  readonly place: string;
  /** How its numbers are defined, in a sentence for the whole row; empty where the formulas say it. */
  readonly definition: string;
  readonly quote: QuoteCells;
  /** Centre of the ellipse, mean of the outline's points, middle of a line, or start of a fit: LPS, mm. */
  readonly centreMm: readonly [number, number, number] | null;
  readonly kernels: readonly KernelValues[];
  /** Flags that hold for the row; those of one kernel stand with it. */
  readonly flags: readonly string[];
}

/** What a row came to on one kernel, and where on its stack; or on both at once. */
export interface KernelValues {
  readonly kernel: ValuesKernel;
  /** As the files have it; never interpreted. Of both: 'soft: …; sharp: …'. */
  readonly kernelLabel: string | null;
  /** Of both: each with ' / ' between. */
  readonly seriesInstanceUid: string;
  readonly quoted: boolean;
  readonly quantities: readonly QuantityValue[];
  /** From 0; null on an oblique cut, and for values of both kernels, whose images stand in `images`. */
  readonly sliceIndex: number | null;
  readonly slices: number;
  readonly sliceOffsetMm: number | null;
  readonly sopInstanceUid: string | null;
  /** From 1; null for an image of its own. */
  readonly frameNumber: number | null;
  /** The images of values of both kernels, soft first; absent for one kernel. */
  readonly images?: readonly ValuesImage[];
  readonly flags: readonly string[];
}

/** An image that values rest on. */
export interface ValuesImage {
  readonly kernel: Kernel;
  /** From 0. */
  readonly sliceIndex: number | null;
  readonly slices: number;
  readonly sopInstanceUid: string;
  /** From 1; null for an image of its own. */
  readonly frameNumber: number | null;
}

/** The images that values rest on: one for one kernel, one of each for both; none on an oblique cut. */
export function imagesOf({ images, ...values }: KernelValues): readonly ValuesImage[] {
  if (images !== undefined) return images;
  const { kernel, sliceIndex, slices, sopInstanceUid, frameNumber } = values;
  if (kernel === 'both' || sopInstanceUid === null) return [];
  return [{ kernel, sliceIndex, slices, sopInstanceUid, frameNumber }];
}

/** 'slice 12 of 64' for people; one of each kernel for both, and nothing on an oblique cut. */
export function sliceText(values: KernelValues): string {
  if (values.images === undefined)
    return values.sliceIndex === null ? '' : `${values.sliceIndex + 1} of ${values.slices}`;
  return values.images
    .flatMap(({ kernel, sliceIndex, slices }) =>
      sliceIndex === null ? [] : [`${kernel} ${sliceIndex + 1} of ${slices}`],
    )
    .join(', ');
}

/** The kernel with its label in the files, for people. */
export function kernelName({ kernel, kernelLabel }: KernelValues): string {
  if (kernel === 'both') return `both kernels at once (${kernelLabel ?? 'no kernel label'})`;
  return `${kernel}, ${kernelLabel ?? 'no kernel label'}`;
}
