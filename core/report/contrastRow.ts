import { formatQuantity } from '../format/index.js';
import type { Note, NoteContrast } from '../note/schema.js';
import { joinedPlace, planeText } from './placeText.js';
import { NO_QUOTE } from './quoteCells.js';
import { findingCells, kernelCells, kernelsOf, spoken } from './rowParts.js';
import type { TableRow } from './tableRow.js';

/** A contrast of a note as a row of the table. */
export function contrastRow(note: Note, contrast: NoteContrast): TableRow {
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
    place: joinedPlace(lumen?.place ?? '', planesOf(note, contrast)),
    definition: '',
    quote: NO_QUOTE,
    centreMm: null,
    kernels: kernelsOf(note).map((of) => ({
      ...kernelCells(of, NOWHERE),
      quoted: false,
      quantities: [
        {
          quantity: 'CNR',
          value: contrast[of.kernel],
          printed: formatQuantity(contrast[of.kernel], 'ratio'),
          unit: '',
          formula: contrast.formula,
        },
      ],
    })),
    flags: spoken(contrast.flags),
  };
}

const NOWHERE = {
  sliceIndex: null,
  sliceOffsetMm: null,
  sopInstanceUid: null,
  frameNumber: null,
  flags: [],
} as const;

/** The oblique cuts that the operands lie on: said once where they share one, by name where they do not. */
function planesOf(note: Note, { lumen, wall, noise, reference }: NoteContrast): string {
  const wanted = noise === 'reference' ? [lumen, wall, reference] : [lumen, wall];
  const operands = note.regions.filter(({ id }) => wanted.includes(id));
  const texts = operands.map((region) => planeText(note, region));
  const [first = ''] = texts;
  if (texts.every((text) => text === first)) return first;
  return operands
    .map(({ label }, index) => `${label} ${texts[index] || 'on the slices'}`)
    .join(', ');
}
