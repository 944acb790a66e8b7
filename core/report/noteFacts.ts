import { formatDicomDate, formatFixed, formatPersonName } from '../format/index.js';
import type { Note, NoteStack } from '../note/schema.js';
import { identityStatement } from './identityStatement.js';
import { planeFacts } from './planeFacts.js';
import { visibilityFact } from './visibilityFact.js';

/** One line of provenance: what it is, and what the file, the reader or the measurement says. */
export interface Fact {
  readonly group:
    | 'Study'
    | 'Acquisition'
    | 'Pair'
    | 'Soft kernel'
    | 'Sharp kernel'
    | 'Oblique cuts'
    | 'Note';
  readonly name: string;
  readonly text: string;
}

/** What stands where a file is silent. */
const UNKNOWN = 'not stated';

/** Where a note's numbers come from: study, acquisition, pair with its evidence, both stacks, and the note itself. */
export function noteFacts(note: Note): readonly Fact[] {
  const { study, conditions, pair } = note;
  const facts: [Fact['group'], string, string | null][] = [
    ['Study', 'Patient ID', study.patientId],
    ['Study', 'Patient name', study.patientName && formatPersonName(study.patientName)],
    ['Study', 'Birth date', study.patientBirthDate && formatDicomDate(study.patientBirthDate)],
    ['Study', 'Sex', study.patientSex],
    ['Study', 'Study date', study.studyDate && formatDicomDate(study.studyDate)],
    ['Study', 'Description', study.studyDescription],
    ['Study', 'Accession number', study.accessionNumber],
    ['Study', 'Study Instance UID', study.studyInstanceUid],
    ['Acquisition', 'Tube voltage', withUnit(conditions.kvp, 'kV')],
    ['Acquisition', 'Phase', withUnit(conditions.phasePercent, '%')],
    ['Acquisition', 'Contrast agent', conditions.contrastAgent],
    ['Acquisition', 'Slice thickness', withUnit(conditions.thicknessMm, 'mm')],
    ['Acquisition', 'Frame of Reference UID', conditions.frameOfReferenceUid],
    ['Pair', 'Linked by', pair.link === 'position' ? 'position in patient space' : 'slice index'],
    ...pair.evidence.map(({ check, state, text }): [Fact['group'], string, string] => [
      'Pair',
      check,
      `${state}: ${text}`,
    ]),
    ...stackFacts('Soft kernel', pair.soft),
    ...(pair.sharp === null ? [] : stackFacts('Sharp kernel', pair.sharp)),
    ...(note.visibility === null
      ? []
      : [
          ['Pair', 'Smallest visible disc', visibilityFact(note.visibility)] as [
            Fact['group'],
            string,
            string,
          ],
        ]),
    ...planeFacts(note).map(({ name, text }): [Fact['group'], string, string] => [
      'Oblique cuts',
      name,
      text,
    ]),
    ['Note', 'Reader', note.reader === '' ? null : note.reader],
    ['Note', 'Completion', note.completion],
    ['Note', 'Verification', note.verification],
    ['Note', 'Begun', note.createdAt],
    ['Note', 'Last changed', note.changedAt],
    ['Note', 'Software', `${note.software.name} ${note.software.version}`],
    ['Note', 'Note identifier', note.id],
    ['Note', 'Synthetic', note.synthetic ? 'yes' : 'no'],
    ['Note', 'Identity', identityStatement(note)],
    ...(note.comment === ''
      ? []
      : [['Note', 'Comment', note.comment] as [Fact['group'], string, string]]),
  ];
  return facts.map(([group, name, text]) => ({ group, name, text: text || UNKNOWN }));
}

function stackFacts(
  group: 'Soft kernel' | 'Sharp kernel',
  stack: NoteStack,
): [Fact['group'], string, string | null][] {
  return [
    [group, 'Kernel label in the files', stack.kernelLabel],
    [group, 'Series', seriesText(stack)],
    [group, 'Series Instance UID', stack.seriesInstanceUid],
    [group, 'Phase', withUnit(stack.phasePercent ?? null, '%')],
    [group, 'Pixel spacing', spacingText(stack.pixelSpacingMm)],
    [group, 'Slices', `${stack.slices}, ${withUnit(stack.sliceSpacingMm, 'mm') ?? UNKNOWN} apart`],
    [group, 'Slice thickness', withUnit(stack.thicknessMm, 'mm')],
    [group, 'Unit of its values', stack.unit],
    [group, 'Lossy compression', stack.lossy ? 'yes: noise and edges are altered' : 'no'],
    ...stack.findings.map(({ text }): [Fact['group'], string, string] => [group, 'Remark', text]),
  ];
}

function seriesText({ seriesNumber, seriesDescription }: NoteStack): string | null {
  const parts = [seriesNumber === null ? null : String(seriesNumber), seriesDescription];
  return parts.filter((part) => part).join(', ') || null;
}

function withUnit(value: number | null, unit: string): string | null {
  return value === null ? null : `${value} ${unit}`;
}

function spacingText(spacingMm: NoteStack['pixelSpacingMm']): string | null {
  if (spacingMm === null) return null;
  const [rows, columns] = spacingMm;
  return `${formatFixed(rows, 4)} mm between rows, ${formatFixed(columns, 4)} mm between columns`;
}
