import { formatDicomDate, formatPersonName, visibleText } from '../../core/format/index.js';
import type { Note } from '../../core/note/index.js';

/** The line that says whose study is on screen: the name apart, since it is set apart. */
export interface IdentityText {
  readonly name: string;
  readonly details: readonly string[];
}

/** Identity as the header shows it. What a file is silent about is left out; an unnamed patient is said to be so. */
export function identityText(study: Note['study']): IdentityText {
  const name = formatPersonName(study.patientName ?? '');
  const date = (raw: string | null) => (raw ? formatDicomDate(raw) : '');
  const details = [
    visibleText(study.patientId ?? ''),
    date(study.patientBirthDate),
    visibleText(study.studyDescription ?? ''),
    date(study.studyDate),
  ];
  return {
    name: name === '' ? 'No patient name' : name,
    details: details.filter((text) => text !== ''),
  };
}
