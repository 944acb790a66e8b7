import { regionQuote } from '../note/quoteInForce.js';
import type { Note, NoteRegion } from '../note/schema.js';
import { shapeCentre } from '../region/index.js';
import { densityQuantities } from './densityQuantities.js';
import { joinedPlace, planeText } from './placeText.js';
import { quoteCells } from './quoteCells.js';
import { regionQuantities } from './regionQuantities.js';
import { findingCells, kernelCells, kernelsOf, spoken } from './rowParts.js';
import type { TableRow } from './tableRow.js';

/** A region of a note as a row of the table. */
export function regionRow(note: Note, region: NoteRegion): TableRow {
  const finding = note.findings.find(({ id }) => id === region.findingId);
  return {
    item: 'region',
    id: region.id,
    label: region.label,
    role: region.role,
    ...findingCells(finding),
    place: joinedPlace(region.place, planeText(note, region)),
    definition: '',
    quote: quoteCells(regionQuote(note, region)),
    centreMm: shapeCentre(region.shape),
    kernels: kernelsOf(note).map((of) => {
      const value = region[of.kernel];
      // Density is read on the soft kernel.
      const density =
        of.kernel === 'soft'
          ? note.densities.find(({ regionId }) => regionId === region.id)
          : undefined;
      const cells = kernelCells(of, value);
      return {
        ...cells,
        quoted: region.quote === of.kernel || region.quote === 'both',
        quantities:
          value === null
            ? []
            : [...regionQuantities(value, of.stack.unit), ...densityQuantities(density)],
        flags: value === null ? cells.flags : [...cells.flags, ...spoken(density?.flags ?? [])],
      };
    }),
    flags: [],
  };
}
