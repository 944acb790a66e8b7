import type { Note } from '../note/schema.js';
import { isQuiet } from '../region/index.js';
import { cautionsOf } from './cautions.js';
import { contrastRow } from './contrastRow.js';
import { edgeLineRows } from './edgeLineRows.js';
import { type Fact, noteFacts } from './noteFacts.js';
import { profileRows } from './profileRows.js';
import { regionRow } from './regionRow.js';
import { stentRows } from './stentRows.js';
import type { TableRow } from './tableRow.js';

/** All that an export shows of a note. Text of files and readers is raw here: each export makes it fit for its form. */
export interface MeasurementTable {
  readonly synthetic: boolean;
  readonly cautions: readonly string[];
  /** Flags that hold for every value alike: said once. */
  readonly remarks: readonly string[];
  /** How the numbers of rows are defined, each definition once. */
  readonly definitions: readonly string[];
  readonly facts: readonly Fact[];
  readonly rows: readonly TableRow[];
}

/** The one table from which every export is made: regions, contrasts, edge lines, profiles, fitted stents. */
export function measurementTable(note: Note): MeasurementTable {
  const rows = [
    ...note.regions.map((region) => regionRow(note, region)),
    ...note.contrasts.map((contrast) => contrastRow(note, contrast)),
    ...edgeLineRows(note),
    ...profileRows(note),
    ...stentRows(note),
  ];
  return {
    synthetic: note.synthetic,
    cautions: cautionsOf(note),
    remarks: quietRemarks(note),
    definitions: definitionsOf(rows),
    facts: noteFacts(note),
    rows,
  };
}

function definitionsOf(rows: readonly TableRow[]): readonly string[] {
  const said = rows
    .filter(({ definition }) => definition !== '')
    .map(({ item, definition }) => `${item[0]?.toUpperCase()}${item.slice(1)}: ${definition}`);
  return [...new Set(said)];
}

function quietRemarks({ regions }: Note): readonly string[] {
  const flags = regions.flatMap(({ soft, sharp }) => [
    ...(soft?.flags ?? []),
    ...(sharp?.flags ?? []),
  ]);
  return [...new Set(flags.filter(isQuiet).map(({ text }) => text))];
}
