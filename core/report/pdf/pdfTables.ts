import { NO_VALUE } from '../../format/index.js';
import type { Fact } from '../noteFacts.js';
import { imagesOf, type KernelValues, kernelName, sliceText, type TableRow } from '../tableRow.js';
import type { PdfCell, PdfPart } from './pdfParts.js';

const head = (text: string): PdfCell => ({ text, look: 'head' });
const numberHead = (text: string): PdfCell => ({ text, look: 'numberHead' });
const words = (text: string): PdfCell => ({ text, look: 'text' });
const digits = (text: string): PdfCell => ({ text, look: 'number' });

const SUMMARY = ['mean', 'standard error', 'SD', 'SNR', 'n'] as const;

/** All regions, a line for each kernel: what is read first. */
export function summaryTable(rows: readonly TableRow[]): PdfPart {
  return {
    kind: 'table',
    widths: [3, 2, 0, 0, 0, 0, 0, 0],
    rows: [
      [head('Region'), head('Kernel'), ...SUMMARY.map(numberHead), head('Quoted')],
      ...rows.flatMap((row) =>
        row.kernels.map((values, index) => [
          words(index === 0 ? [row.label, row.place].filter(Boolean).join(', ') : ''),
          words(kernelName(values)),
          ...SUMMARY.map((quantity) => digits(printed(values, quantity))),
          words(values.quoted ? 'yes' : ''),
        ]),
      ),
    ],
  };
}

/** Every number of one region, both kernels beside each other, with its formula and its image. */
export function detailTable({ kernels }: TableRow): PdfPart {
  const names = [...new Set(kernels.flatMap((values) => values.quantities.map((q) => q.quantity)))];
  const of = (name: string) =>
    kernels.flatMap((values) => values.quantities.find(({ quantity }) => quantity === name) ?? []);
  return {
    kind: 'table',
    widths: [0, 0, ...kernels.map(() => 0), 1],
    rows: [
      [
        head('Quantity'),
        head('Unit'),
        ...kernels.map((values) => numberHead(kernelName(values))),
        head('How'),
      ],
      ...names.map((name) => {
        const [first] = of(name);
        return [
          words(name),
          words(first?.unit ?? ''),
          ...kernels.map((values) => digits(printed(values, name))),
          words(first?.formula ?? ''),
        ];
      }),
      [
        words('image'),
        words(''),
        ...kernels.map((values) => digits(sliceWords(values))),
        words(kernels.map(imageWords).join('\n')),
      ],
    ],
  };
}

/** All contrasts, a line for each kernel. */
export function contrastTable(rows: readonly TableRow[]): PdfPart {
  return {
    kind: 'table',
    widths: [0, 3, 2, 0, 3],
    rows: [
      [head(''), head('Contrast'), head('Kernel'), numberHead('CNR'), head('Formula')],
      ...rows.flatMap((row) =>
        row.kernels.map((values, index) => [
          words(index === 0 ? row.id : ''),
          words(index === 0 ? row.label : ''),
          words(kernelName(values)),
          digits(printed(values, 'CNR')),
          words(values.quantities.find(({ quantity }) => quantity === 'CNR')?.formula ?? ''),
        ]),
      ),
    ],
  };
}

/** Provenance, group by group. */
export function factsTable(facts: readonly Fact[]): readonly PdfPart[] {
  return [...new Set(facts.map(({ group }) => group))].flatMap((group): readonly PdfPart[] => [
    { kind: 'subheading', text: group },
    {
      kind: 'table',
      widths: [1, 3],
      rows: facts
        .filter((fact) => fact.group === group)
        .map(({ name, text }) => [words(name), words(text)]),
    },
  ]);
}

function sliceWords(values: KernelValues): string {
  const slice = sliceText(values);
  return slice === '' ? NO_VALUE : `slice ${slice}`;
}

/** UIDs of the images that values rest on. */
function imageWords(values: KernelValues): string {
  const uids = imagesOf(values).map(({ sopInstanceUid }) => sopInstanceUid);
  return uids.length === 0 ? NO_VALUE : uids.join('\n');
}

function printed({ quantities }: KernelValues, name: string): string {
  return quantities.find(({ quantity }) => quantity === name)?.printed ?? NO_VALUE;
}
