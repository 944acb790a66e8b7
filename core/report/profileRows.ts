import type { NoteProfileValue } from '../note/profileSchema.js';
import { profileQuoteInForce } from '../note/quoteInForce.js';
import type { Note } from '../note/schema.js';
import { middleOf } from '../region/index.js';
import { joinedPlace, lineText, planeText } from './placeText.js';
import { type QuantityDefinition, quantityValues } from './quantityDefinition.js';
import { quoteCells } from './quoteCells.js';
import { findingCells, kernelCells, kernelsOf } from './rowParts.js';
import type { TableRow } from './tableRow.js';

/** The quantities of a profile, in the order of the tables. */
export const PROFILE_DEFINITIONS: readonly QuantityDefinition<NoteProfileValue>[] = [
  {
    quantity: 'visible width',
    value: ({ visibleWidthMm }) => visibleWidthMm,
    digits: 'lengthMm',
    unit: 'mm',
    formula: 'between the inner half-height points of the struts, or at half height of a lumen',
  },
  {
    quantity: 'strut peak distance',
    value: ({ peakDistanceMm }) => peakDistanceMm,
    digits: 'lengthMm',
    unit: 'mm',
    formula: 'between the peaks of the two struts',
  },
  {
    quantity: 'strut width',
    value: ({ strutWidthMm }) => strutWidthMm,
    digits: 'lengthMm',
    unit: 'mm',
    formula: 'between inner and outer half-height points of a strut, mean of both struts',
  },
  {
    quantity: 'inner edge rise',
    value: ({ riseMm }) => riseMm,
    digits: 'lengthMm',
    unit: 'mm',
    formula: '10-90 % distance of the inner edges',
  },
  {
    quantity: 'lumen level',
    value: ({ lumenHu }) => lumenHu,
    digits: 'hu',
    unit: 'HU',
    formula: 'median of the middle third between the struts, or highest value of a lumen',
  },
  {
    quantity: 'artificial narrowing',
    value: ({ narrowing }) => (narrowing === null ? null : 100 * narrowing),
    digits: 'narrowingPercent',
    unit: '%',
    formula: '1 - visible width / nominal inner diameter',
  },
];

/** The profiles of a note as rows of the table. */
export function profileRows(note: Note): readonly TableRow[] {
  return note.profiles.map((profile) => ({
    item: 'profile',
    id: profile.id,
    label: profile.label,
    role: '',
    ...findingCells(undefined),
    nominalMm: profile.nominalMm ?? null,
    place: joinedPlace(lineText(profile), planeText(note, profile)),
    definition: profile.definition,
    quote: quoteCells(profileQuoteInForce(profile)),
    centreMm: middleOf(profile),
    kernels: kernelsOf(note).map((of) => {
      const value = profile[of.kernel];
      return {
        ...kernelCells(of, value),
        quoted: profile.quote === of.kernel || profile.quote === 'both',
        quantities: value === null ? [] : quantityValues(PROFILE_DEFINITIONS, value),
      };
    }),
    flags: [],
  }));
}
