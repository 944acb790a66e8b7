import { formatFixed, formatQuantity, MINUS, type Quantity } from '../format/index.js';
import type { NoteEdge } from '../note/edgeSchema.js';
import { edgeQuoteInForce } from '../note/quoteInForce.js';
import type { Note } from '../note/schema.js';
import { middleOf } from '../region/index.js';
import type { KernelValues, TableRow } from './measurementTable.js';
import { quoteCells } from './quoteCells.js';
import type { QuantityValue } from './regionQuantities.js';

type EdgeNumbers = NonNullable<NoteEdge['soft']>;

const DEFINITIONS: readonly {
  readonly quantity: string;
  readonly value: (of: EdgeNumbers) => number | null;
  readonly digits: Quantity | 'count';
  readonly unit: string;
  readonly formula: string;
}[] = [
  {
    quantity: 'edge rise',
    value: ({ riseMm }) => riseMm,
    digits: 'lengthMm',
    unit: 'mm',
    formula: '10-90 % distance of the Gaussian-blurred step fitted to the band, across the edge',
  },
  {
    quantity: 'edge rise standard error',
    value: ({ riseErrorMm }) => riseErrorMm,
    digits: 'lengthMm',
    unit: 'mm',
    formula: 'of the fit, with correlated noise',
  },
  {
    quantity: 'edge crossings',
    value: ({ crossingsMm }) => crossingsMm,
    digits: 'lengthMm',
    unit: 'mm',
    formula: '10-90 % distance read off the measured profile',
  },
  {
    quantity: 'blur FWHM',
    value: ({ blurFwhmMm }) => blurFwhmMm,
    digits: 'lengthMm',
    unit: 'mm',
    formula: 'edge rise / 2.5631 * 2.3548',
  },
  {
    quantity: 'edge step',
    value: ({ fromHu, toHu }) => (fromHu === null || toHu === null ? null : toHu - fromHu),
    digits: 'hu',
    unit: 'HU',
    formula: 'level behind the edge - level before it, from the start of the line on',
  },
  {
    quantity: 'edge pixels',
    value: ({ n }) => n,
    digits: 'count',
    unit: 'px',
    formula: 'pixels with their centre in the band',
  },
];

/** Names of an edge line's quantities, in the order of the tables. */
export const EDGE_QUANTITIES: readonly string[] = DEFINITIONS.map(({ quantity }) => quantity);

/** The edge lines of a note as rows of the long table. */
export function edgeLineRows({ edges, pair }: Note): readonly TableRow[] {
  const stacks = [
    { kernel: 'soft' as const, stack: pair.soft },
    ...(pair.sharp === null ? [] : [{ kernel: 'sharp' as const, stack: pair.sharp }]),
  ];
  return edges.map((edge) => ({
    item: 'edge line',
    id: edge.id,
    label: edge.label,
    role: '',
    segment: '',
    finding: '',
    nominalMm: null,
    assessability: '',
    reason: '',
    place: placeText(edge),
    quote: quoteCells(edgeQuoteInForce(edge)),
    centreMm: middleOf(edge),
    kernels: stacks.map(({ kernel, stack }): KernelValues => {
      const value = edge[kernel];
      return {
        kernel,
        kernelLabel: stack.kernelLabel,
        seriesInstanceUid: stack.seriesInstanceUid,
        quoted: edge.quote === kernel || edge.quote === 'both',
        quantities: value === null ? [] : quantitiesOf(value),
        sliceIndex: value?.sliceIndex ?? null,
        slices: stack.slices,
        sliceOffsetMm: value?.sliceOffsetMm ?? null,
        sopInstanceUid: value?.sopInstanceUid ?? null,
        frameNumber: value?.frameNumber ?? null,
        flags:
          value === null ? ['Not measured on this kernel.'] : value.flags.map(({ text }) => text),
      };
    }),
    flags: [],
  }));
}

/** Where a line runs: from, to and the width of its band; a line can be drawn again from it. */
function placeText({ fromMm, toMm, bandMm }: NoteEdge): string {
  const point = (mm: readonly number[]): string =>
    mm.map((part) => formatFixed(part, 2).replace(MINUS, '-')).join(', ');
  return `from (${point(fromMm)}) to (${point(toMm)}) mm, band ${formatFixed(bandMm, 1)} mm`;
}

function quantitiesOf(of: EdgeNumbers): readonly QuantityValue[] {
  return DEFINITIONS.map(({ quantity, value, digits, unit, formula }) => {
    const number = value(of);
    const printed = digits === 'count' ? formatFixed(number, 0) : formatQuantity(number, digits);
    return { quantity, value: number, printed, unit, formula };
  });
}
