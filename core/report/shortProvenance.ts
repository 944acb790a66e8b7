import type { Note } from '../note/schema.js';
import { speaksAgainst } from '../pairing/checks.js';
import { cautionsOf } from './cautions.js';
import { identityStatement } from './identityStatement.js';
import { measurementTable } from './measurementTable.js';
import { planeFacts } from './planeFacts.js';
import { STENT_CAUTION } from './stentSentence.js';

/** Lines that go with a table on the clipboard: what the numbers are from, and the cautions that can't be left out. */
export function shortProvenance(note: Note): readonly string[] {
  const { pair, conditions, software } = note;
  const label = (kernelLabel: string | null) => kernelLabel ?? 'no kernel label';
  const kernels =
    pair.sharp === null
      ? `Soft: ${label(pair.soft.kernelLabel)}`
      : `Soft: ${label(pair.soft.kernelLabel)}; sharp: ${label(pair.sharp.kernelLabel)}`;
  const kvp = conditions.kvp === null ? 'tube voltage not stated' : `${conditions.kvp} kV`;
  const doubts = pair.evidence.filter(speaksAgainst);
  return [
    `${kernels}; ${kvp}; ${software.name} ${software.version}; ${note.changedAt || 'time not stated'}; ${note.verification}, ${note.completion}.`,
    ...(note.deidentified === undefined ? [] : [identityStatement(note)]),
    ...(pair.sharp === null || doubts.length === 0
      ? []
      : [`Pair: ${doubts.map(({ check, state }) => `${check} ${state}`).join('; ')}.`]),
    ...measurementTable(note).definitions,
    ...planeFacts(note).map(({ name, text }) => `${name}: ${text}`),
    ...cautionsOf(note).slice(0, note.synthetic ? 3 : 2),
    ...(note.stents.length > 0 ? [STENT_CAUTION] : []),
  ];
}
