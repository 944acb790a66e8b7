import { NO_VALUE } from '../format/index.js';
import type { Kernel } from '../note/schema.js';
import { EDGE_DEFINITIONS } from './edgeLineRows.js';
import type { MeasurementTable } from './measurementTable.js';
import { PROFILE_DEFINITIONS } from './profileRows.js';
import type { QuantityValue } from './quantityDefinition.js';
import { KERNEL_DEFINITIONS, STENT_DEFINITIONS } from './stentQuantities.js';
import type { RowItem, TableRow, ValuesKernel } from './tableRow.js';

/** A column of the wide form: one row an item of the note, both kernels side by side. */
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

const KERNEL_TITLE: Readonly<Record<ValuesKernel, string>> = {
  soft: 'Soft',
  sharp: 'Sharp',
  both: 'Both',
};

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

/** A quantity that rows of one kind have under one kernel. */
interface WideQuantity {
  readonly name: string;
  readonly item: RowItem;
}

/** The columns of a note's wide table. A quantity's unit stands in the title, taken from the rows. */
export function wideColumns(table: MeasurementTable): readonly WideColumn[] {
  const present: Kernel[] = table.rows.some(({ kernels }) =>
    kernels.some(({ kernel }) => kernel === 'sharp'),
  )
    ? ['soft', 'sharp']
    : ['soft'];
  const ofItem = (
    item: RowItem,
    definitions: readonly { readonly quantity: string }[],
  ): readonly WideQuantity[] =>
    table.rows.some((row) => row.item === item)
      ? definitions.map(({ quantity }) => ({ name: quantity, item }))
      : [];
  const ofOne: readonly WideQuantity[] = [
    ...REGION_QUANTITIES.map((name) => ({ name, item: 'region' as const })),
    { name: 'CNR', item: 'contrast' },
    ...ofItem('edge line', EDGE_DEFINITIONS),
    ...ofItem('profile', PROFILE_DEFINITIONS),
    ...ofItem('fitted stent', KERNEL_DEFINITIONS),
  ];
  return [
    text('id', 'ID', ({ id }) => id),
    text('label', 'Name', ({ label }) => label),
    text('role', 'Role', ({ role }) => role),
    text('segment', 'Segment', ({ segment }) => segment),
    text('finding', 'Finding', ({ finding, nominalMm }) =>
      [finding, nominalMm === null ? '' : `nominal ${nominalMm} mm`]
        .filter((part) => part !== '')
        .join(', '),
    ),
    text('assessability', 'Assessability', ({ assessability }) => assessability),
    text('reason', 'Reason', ({ reason }) => reason),
    text('place', 'Place', ({ place }) => place),
    ...present.flatMap((kernel) => ofOne.map((quantity) => number(table, kernel, quantity))),
    ...ofItem('fitted stent', STENT_DEFINITIONS).map((quantity) => number(table, 'both', quantity)),
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
    values.flags.map((flag) =>
      // What holds for both at once needs no name of a kernel.
      values.kernel === 'both' ? flag : `${KERNEL_TITLE[values.kernel]}: ${flag}`,
    ),
  );
  return [...ofKernels, ...flags].join(' ');
}

function text(key: string, title: string, of: (row: TableRow) => string): WideColumn {
  return { key, title, numeric: false, exact: of, printed: of };
}

function number(
  table: MeasurementTable,
  kernel: ValuesKernel,
  { name, item }: WideQuantity,
): WideColumn {
  const find = ({ kernels }: TableRow): QuantityValue | undefined =>
    kernels
      .find((values) => values.kernel === kernel)
      ?.quantities.find((value) => value.quantity === name);
  const unit = table.rows.map(find).find((value) => value !== undefined)?.unit;
  return {
    // HU stands in a column of its own; a length without its unit would be taken for it.
    key: `${kernel}_${name.toLowerCase().replaceAll(' ', '_')}${KEY_UNITS[unit ?? ''] ?? ''}`,
    title: `${KERNEL_TITLE[kernel]} ${name}${unit ? `, ${unit}` : ''}`,
    numeric: true,
    exact: (row) => find(row)?.value ?? null,
    printed: (row) => find(row)?.printed ?? (item === row.item ? NO_VALUE : ''),
  };
}

/** Ends of the keys of columns that are neither in HU nor without a unit. */
const KEY_UNITS: Readonly<Record<string, string>> = {
  mm: '_mm',
  '%': '_percent',
  '°': '_deg',
  HU·mm: '_hu_mm',
};
