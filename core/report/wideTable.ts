import { NO_VALUE } from '../format/index.js';
import type { Kernel, Note } from '../note/schema.js';
import { EDGE_QUANTITIES, edgeLineRows } from './edgeLineRows.js';
import {
  type KernelValues,
  type MeasurementTable,
  measurementTable,
  type TableRow,
} from './measurementTable.js';
import type { QuantityValue } from './regionQuantities.js';

/** A column of the wide form: one row a region, contrast or edge line, both kernels side by side. */
export interface WideColumn {
  /** For machines: 'soft_mean'. */
  readonly key: string;
  /** For people: 'Soft mean, HU'. */
  readonly title: string;
  readonly numeric: boolean;
  /** Full precision. */
  readonly exact: (row: TableRow) => string | number | null;
  /** For people; an en dash for a number that could not be had, nothing where none belongs. */
  readonly printed: (row: TableRow) => string;
}

const KERNEL_TITLE: Readonly<Record<Kernel, string>> = { soft: 'Soft', sharp: 'Sharp' };

/** The table with the note's edge lines after its regions and contrasts. */
export function wideTable(note: Note): MeasurementTable {
  const table = measurementTable(note);
  return { ...table, rows: [...table.rows, ...edgeLineRows(note)] };
}

const REGION_QUANTITIES = [
  'mean',
  'SD',
  'median',
  'minimum',
  'maximum',
  'n',
  'area',
  'sampled area',
  'SNR',
  'standard error',
  'placement',
] as const;

const ITEM_OF: ReadonlyMap<string, TableRow['item']> = new Map([
  ...REGION_QUANTITIES.map((name) => [name, 'region'] as const),
  ['CNR', 'contrast'] as const,
  ...EDGE_QUANTITIES.map((name) => [name, 'edge line'] as const),
]);

/** The columns of a note's wide table. A quantity's unit stands in the title, taken from the rows. */
export function wideColumns(table: MeasurementTable): readonly WideColumn[] {
  const present: Kernel[] = table.rows.some(({ kernels }) => kernels.length > 1)
    ? ['soft', 'sharp']
    : ['soft'];
  const quantities = [
    ...REGION_QUANTITIES,
    'CNR',
    ...(table.rows.some(({ item }) => item === 'edge line') ? EDGE_QUANTITIES : []),
  ];
  return [
    text('id', 'ID', ({ id }) => id),
    text('label', 'Region, contrast or edge line', ({ label }) => label),
    text('role', 'Role', ({ role }) => role),
    text('segment', 'Segment', ({ segment }) => segment),
    text('finding', 'Finding', ({ finding, nominalMm }) =>
      nominalMm === null ? finding : `${finding}, nominal ${nominalMm} mm`,
    ),
    text('assessability', 'Assessability', ({ assessability }) => assessability),
    text('reason', 'Reason', ({ reason }) => reason),
    text('place', 'Place', ({ place }) => place),
    ...present.flatMap((kernel) => quantities.map((name) => number(table, kernel, name))),
    text('quote', 'Quoted', ({ quote }) => quote.kernel),
    text('quote_by', 'Quoted by', ({ quote }) => quote.by),
    text('quote_reason', 'Quoted because', ({ quote }) => quote.reason),
    text('formula', 'Formula of the CNR', ({ item, kernels }) =>
      item === 'contrast' ? (kernels[0]?.quantities[0]?.formula ?? '') : '',
    ),
    text('flags', 'Flags', flagsText),
  ];
}

/** Flags of a row in sentences, each under the kernel that it holds for. */
export function flagsText({ kernels, flags }: TableRow): string {
  const ofKernels = kernels.flatMap((values) =>
    values.flags.map((flag) => `${KERNEL_TITLE[values.kernel]}: ${flag}`),
  );
  return [...ofKernels, ...flags].join(' ');
}

function text(key: string, title: string, of: (row: TableRow) => string): WideColumn {
  return { key, title, numeric: false, exact: of, printed: of };
}

function number(table: MeasurementTable, kernel: Kernel, quantity: string): WideColumn {
  const find = ({ kernels }: TableRow): QuantityValue | undefined =>
    kernels
      .find((values: KernelValues) => values.kernel === kernel)
      ?.quantities.find((value) => value.quantity === quantity);
  const unit = table.rows.map(find).find((value) => value !== undefined)?.unit;
  return {
    // HU stands in a column of its own; a length without its unit would be taken for it.
    key: `${kernel}_${quantity.toLowerCase().replaceAll(' ', '_')}${unit === 'mm' ? '_mm' : ''}`,
    title: `${KERNEL_TITLE[kernel]} ${quantity}${unit ? `, ${unit}` : ''}`,
    numeric: true,
    exact: (row) => find(row)?.value ?? null,
    printed: (row) => {
      const belongs = ITEM_OF.get(quantity) === row.item;
      return find(row)?.printed ?? (belongs ? NO_VALUE : '');
    },
  };
}
