import type { NoteEdge } from '../note/edgeSchema.js';
import { edgeQuoteInForce } from '../note/quoteInForce.js';
import type { Note } from '../note/schema.js';
import { middleOf } from '../region/index.js';
import { joinedPlace, lineText, planeText } from './placeText.js';
import { type QuantityDefinition, quantityValues } from './quantityDefinition.js';
import { quoteCells } from './quoteCells.js';
import { findingCells, kernelCells, kernelsOf } from './rowParts.js';
import type { TableRow } from './tableRow.js';

/** The quantities of an edge line, in the order of the tables. */
export const EDGE_DEFINITIONS: readonly QuantityDefinition<NonNullable<NoteEdge['soft']>>[] = [
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

/** The edge lines of a note as rows of the table. */
export function edgeLineRows(note: Note): readonly TableRow[] {
  return note.edges.map((edge) => ({
    item: 'edge line',
    id: edge.id,
    label: edge.label,
    role: '',
    ...findingCells(undefined),
    place: joinedPlace(lineText(edge), planeText(note, edge)),
    definition: '',
    quote: quoteCells(edgeQuoteInForce(edge)),
    centreMm: middleOf(edge),
    kernels: kernelsOf(note).map((of) => {
      const value = edge[of.kernel];
      return {
        ...kernelCells(of, value),
        quoted: edge.quote === of.kernel || edge.quote === 'both',
        quantities: value === null ? [] : quantityValues(EDGE_DEFINITIONS, value),
      };
    }),
    flags: [],
  }));
}
