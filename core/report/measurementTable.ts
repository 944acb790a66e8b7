import { formatQuantity } from '../format/index.js';
import { regionQuote } from '../note/quoteInForce.js';
import type { Kernel, Note, NoteContrast, NoteFinding, NoteRegion } from '../note/schema.js';
import { segmentOf } from '../note/segments.js';
import { type Flag, isQuiet, shapeCentre } from '../region/index.js';
import { cautionsOf } from './cautions.js';
import { densityQuantities } from './densityQuantities.js';
import { type Fact, noteFacts } from './noteFacts.js';
import { NO_QUOTE, type QuoteCells, quoteCells } from './quoteCells.js';
import { type QuantityValue, regionQuantities } from './regionQuantities.js';

/** All that an export shows of a note. Text of files and readers is raw here: each export makes it fit for its form. */
export interface MeasurementTable {
  readonly synthetic: boolean;
  readonly cautions: readonly string[];
  /** Flags that hold for every value alike: said once. */
  readonly remarks: readonly string[];
  readonly facts: readonly Fact[];
  readonly rows: readonly TableRow[];
}

/** A region or a contrast, with what it came to on each kernel of the pair. */
export interface TableRow {
  readonly item: 'region' | 'contrast' | 'edge line';
  readonly id: string;
  readonly label: string;
  readonly role: string;
  /** '7 mLAD'; empty for none. */
  readonly segment: string;
  readonly finding: string;
  readonly nominalMm: number | null;
  readonly assessability: string;
  readonly reason: string;
  readonly place: string;
  readonly quote: QuoteCells;
  /** Centre of the ellipse, or mean of the outline's points: LPS, mm. */
  readonly centreMm: readonly [number, number, number] | null;
  readonly kernels: readonly KernelValues[];
  /** Flags of a contrast, which hold for the row; those of a region stand with its kernel. */
  readonly flags: readonly string[];
}

/** What a row came to on one kernel, and where on its stack. */
export interface KernelValues {
  readonly kernel: Kernel;
  /** As the files have it; never interpreted. */
  readonly kernelLabel: string | null;
  readonly seriesInstanceUid: string;
  readonly quoted: boolean;
  readonly quantities: readonly QuantityValue[];
  /** From 0. */
  readonly sliceIndex: number | null;
  readonly slices: number;
  readonly sliceOffsetMm: number | null;
  readonly sopInstanceUid: string | null;
  /** From 1; null for an image of its own. */
  readonly frameNumber: number | null;
  readonly flags: readonly string[];
}

/** The one table from which every export is made. */
export function measurementTable(note: Note): MeasurementTable {
  return {
    synthetic: note.synthetic,
    cautions: cautionsOf(note),
    remarks: quietRemarks(note),
    facts: noteFacts(note),
    rows: [
      ...note.regions.map((region) => regionRow(note, region)),
      ...note.contrasts.map((contrast) => contrastRow(note, contrast)),
    ],
  };
}

function regionRow(note: Note, region: NoteRegion): TableRow {
  const finding = note.findings.find(({ id }) => id === region.findingId);
  return {
    item: 'region',
    id: region.id,
    label: region.label,
    role: region.role,
    ...findingCells(finding),
    place: region.place,
    quote: quoteCells(regionQuote(note, region)),
    centreMm: shapeCentre(region.shape),
    kernels: kernelsOf(note).map(({ kernel, stack }) => {
      const value = region[kernel];
      // Density is read on the soft kernel.
      const density =
        kernel === 'soft'
          ? note.densities.find(({ regionId }) => regionId === region.id)
          : undefined;
      return {
        kernel,
        kernelLabel: stack.kernelLabel,
        seriesInstanceUid: stack.seriesInstanceUid,
        quoted: region.quote === kernel || region.quote === 'both',
        quantities:
          value === null
            ? []
            : [...regionQuantities(value, stack.unit), ...densityQuantities(density)],
        sliceIndex: value?.sliceIndex ?? null,
        slices: stack.slices,
        sliceOffsetMm: value?.sliceOffsetMm ?? null,
        sopInstanceUid: value?.sopInstanceUid ?? null,
        frameNumber: value?.frameNumber ?? null,
        flags:
          value === null
            ? ['Not measured on this kernel.']
            : spoken([...value.flags, ...(density?.flags ?? [])]),
      };
    }),
    flags: [],
  };
}

function contrastRow(note: Note, contrast: NoteContrast): TableRow {
  const lumen = note.regions.find(({ id }) => id === contrast.lumen);
  const finding = note.findings.find(({ id }) => id === lumen?.findingId);
  const named = (id: string) => note.regions.find((region) => region.id === id)?.label ?? id;
  const reference =
    contrast.noise === 'reference' && contrast.reference !== undefined
      ? `, noise of ${named(contrast.reference)}`
      : '';
  return {
    item: 'contrast',
    id: contrast.id,
    label: `${named(contrast.lumen)} against ${named(contrast.wall)}${reference}`,
    role: '',
    ...findingCells(finding),
    place: lumen?.place ?? '',
    quote: NO_QUOTE,
    centreMm: null,
    kernels: kernelsOf(note).map(({ kernel, stack }) => ({
      kernel,
      kernelLabel: stack.kernelLabel,
      seriesInstanceUid: stack.seriesInstanceUid,
      quoted: false,
      quantities: [
        {
          quantity: 'CNR',
          value: contrast[kernel],
          printed: formatQuantity(contrast[kernel], 'ratio'),
          unit: '',
          formula: contrast.formula,
        },
      ],
      sliceIndex: null,
      slices: stack.slices,
      sliceOffsetMm: null,
      sopInstanceUid: null,
      frameNumber: null,
      flags: [],
    })),
    flags: spoken(contrast.flags),
  };
}

function kernelsOf({ pair }: Note) {
  return [
    { kernel: 'soft' as const, stack: pair.soft },
    ...(pair.sharp === null ? [] : [{ kernel: 'sharp' as const, stack: pair.sharp }]),
  ];
}

function findingCells(finding: NoteFinding | undefined) {
  const segment = segmentOf(finding?.segment ?? null);
  return {
    segment: segment === undefined ? '' : `${segment.number} ${segment.abbreviation}`,
    finding: finding?.kind ?? '',
    nominalMm: finding?.nominalMm ?? null,
    assessability: finding?.assessability ?? '',
    reason: finding?.reason ?? '',
  };
}

function spoken(flags: readonly Flag[]): readonly string[] {
  return flags.filter((flag) => !isQuiet(flag)).map(({ text }) => text);
}

function quietRemarks({ regions }: Note): readonly string[] {
  const flags = regions.flatMap(({ soft, sharp }) => [
    ...(soft?.flags ?? []),
    ...(sharp?.flags ?? []),
  ]);
  return [...new Set(flags.filter(isQuiet).map(({ text }) => text))];
}
