import { formatDicomDate, formatPersonName } from '../../format/index.js';
import type { Note } from '../../note/schema.js';

/** Words of a name that are too short to be looked for: 'de', 'Li'. They stand in sentences of every kind. */
const SHORTEST_WORD = 3;

/** Everything in a note that says who the patient or the reader is, or when: what must stand in no sentence that is kept. */
export function identifyingValues(note: Note): readonly string[] {
  const { study, pair, conditions } = note;
  const names = [
    study.patientName,
    note.reader,
    note.seal?.by,
    ...note.amendments.map(({ by }) => by),
  ].filter((name) => typeof name === 'string');
  const dates = [study.patientBirthDate, study.studyDate].filter((date) => date !== null);
  const values = [
    ...names,
    ...names.map(formatPersonName),
    ...names
      .flatMap((name) => name.split(/[\s^=,]+/))
      .filter((word) => word.length >= SHORTEST_WORD),
    ...dates,
    ...dates.map(formatDicomDate),
    study.patientId,
    study.accessionNumber,
    study.studyDescription,
    conditions.contrastAgent,
    pair.soft.seriesDescription,
    pair.sharp?.seriesDescription,
    note.id,
  ];
  const said = values.filter((value) => typeof value === 'string').map((value) => value.trim());
  return [...new Set(said.filter((value) => value !== ''))];
}
