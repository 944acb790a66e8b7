import { amendmentText } from '../../note/life/index.js';
import { type Note, NoteSchema } from '../../note/schema.js';
import { segmentOf } from '../../note/segments.js';
import { identityStatement } from '../identityStatement.js';
import type { MeasurementTable } from '../measurementTable.js';
import { type Code, dcm } from './code.js';
import { type ContentItem, codeItem, containerItem, textIfAny, textItem } from './contentItem.js';
import type { ReportContext } from './context.js';
import { otherStudyUnknown } from './evidence.js';
import { documentSeal } from './modules.js';
import { OWN } from './ownCodes.js';
import { DOMINANCE_CODES } from './readingCodes.js';

/** Qualitative Evaluations (TID 1500, row 12). */
const QUALITATIVE: Code = {
  value: 'C0034375',
  scheme: 'UMLS',
  meaning: 'Qualitative Evaluations',
};

/**
 * What is said of the note as a whole: that it is synthetic and other cautions, with or without identity, dominance,
 * where the numbers come from, the comment, and what was amended. The patient's data stand in their own module only.
 */
export function statements(context: ReportContext, table: MeasurementTable): ContentItem {
  const { note } = context;
  const { dominance, absentSegments } = note.anatomy;
  const absent = absentSegments.map((number) => segmentOf(number)?.abbreviation ?? number);
  return containerItem(QUALITATIVE, [
    ...table.cautions.map((caution) => textItem('CONTAINS', OWN.caution, caution)),
    textItem('CONTAINS', OWN.identity, identityStatement(note)),
    ...(dominance === null
      ? []
      : [codeItem('CONTAINS', dcm('121071', 'Finding'), DOMINANCE_CODES[dominance])]),
    ...textIfAny('CONTAINS', OWN.absentSegments, absent.join(', ')),
    ...table.remarks.map((remark) => textItem('CONTAINS', OWN.remark, remark)),
    ...table.facts
      .filter(({ group, name }) => group !== 'Study' && name !== 'Reader' && name !== 'Comment')
      .map(({ group, name, text }) =>
        textItem('CONTAINS', OWN.provenance, `${group}: ${name}: ${text}`),
      ),
    ...(otherStudyUnknown(context)
      ? [
          textItem(
            'CONTAINS',
            OWN.remark,
            'The sharp series belongs to another study, whose UID this document could not tell: its images are listed under the study of the soft series.',
          ),
        ]
      : []),
    ...(note.seal === null || documentSeal(note) !== null
      ? []
      : [
          textItem(
            'CONTAINS',
            OWN.remark,
            `The note was verified by ${note.seal.by}, ${note.seal.at}, but DICOM has VERIFIED only for a complete document with a date: this one is marked as unverified.`,
          ),
        ]),
    ...textIfAny('CONTAINS', dcm('121106', 'Comment'), note.comment),
    ...amendments(note).map((text) => textItem('CONTAINS', OWN.amendment, text)),
  ]);
}

/** Each amendment with what the state after it says otherwise. */
function amendments(note: Note): readonly string[] {
  return note.amendments.map((amendment, index) => {
    const { at, by, why } = amendment;
    const next = NoteSchema.safeParse({ ...note.amendments[index + 1]?.before, amendments: [] });
    const changes = amendmentText(amendment, next.success ? next.data : note);
    return [`${at}, ${by}: ${why}`, ...changes].join('\n');
  });
}
