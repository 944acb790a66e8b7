import type { WriteElement } from '../../dicom/write/index.js';
import type { Note } from '../../note/schema.js';
import { stableUid } from '../../stableUid.js';
import { codeSequence, dcm } from './code.js';
import { DUMMY_MOMENT, dateTimeText, momentOf } from './moment.js';
import { srDate, srPersonName, srText } from './srText.js';
import { studyUidOf } from './uidOf.js';

/** Comprehensive SR Storage (PS3.4 B.5). */
export const COMPREHENSIVE_SR = '1.2.840.10008.5.1.4.1.1.88.33';

/** Number of the document's series: a note has one series, away from those of the scanner. */
const SERIES_NUMBER = 9901;

/** Patient Module (PS3.3 C.7.1.1), and how it was de-identified where it was. */
export function patientModule({ study, deidentified }: Note): readonly WriteElement[] {
  const sex = study.patientSex?.trim() ?? '';
  return [
    { tag: 0x00100010, vr: 'PN', value: srPersonName(study.patientName ?? '') },
    { tag: 0x00100020, vr: 'LO', value: srText(study.patientId ?? '') },
    { tag: 0x00100030, vr: 'DA', value: srDate(study.patientBirthDate) },
    { tag: 0x00100040, vr: 'CS', value: ['M', 'F', 'O'].includes(sex) ? sex : '' },
    ...(deidentified === undefined
      ? []
      : ([
          { tag: 0x00120062, vr: 'CS', value: 'YES' },
          {
            tag: 0x00120063,
            vr: 'LO',
            value: 'PS3.15 E, basic profile, structured content cleaned',
          },
          codeSequence(
            0x00120064,
            dcm('113100', 'Basic Application Confidentiality Profile'),
            dcm('113104', 'Clean Structured Content Option'),
          ),
          { tag: 0x00280303, vr: 'CS', value: 'REMOVED' },
        ] satisfies readonly WriteElement[])),
  ];
}

/** General Study Module (C.7.2.1): the study of the images. The note knows no study time, referrer or Study ID. */
export function studyModule(note: Note): readonly WriteElement[] {
  const { study } = note;
  return [
    { tag: 0x0020000d, vr: 'UI', value: studyUidOf(note) },
    { tag: 0x00080020, vr: 'DA', value: srDate(study.studyDate) },
    { tag: 0x00080030, vr: 'TM', value: '' },
    { tag: 0x00080090, vr: 'PN', value: '' },
    { tag: 0x00200010, vr: 'SH', value: '' },
    { tag: 0x00080050, vr: 'SH', value: srText(study.accessionNumber ?? '', 16) },
    ...(study.studyDescription === null
      ? []
      : [{ tag: 0x00081030, vr: 'LO' as const, value: srText(study.studyDescription) }]),
  ];
}

/** SR Document Series Module (C.17.1) and General Equipment Module (C.7.5.1). */
export function seriesAndEquipment({ id, software, synthetic }: Note): readonly WriteElement[] {
  return [
    { tag: 0x00080060, vr: 'CS', value: 'SR' },
    { tag: 0x0020000e, vr: 'UI', value: stableUid(`${id}\nstructured reports`) },
    { tag: 0x00200011, vr: 'IS', value: SERIES_NUMBER },
    {
      tag: 0x0008103e,
      vr: 'LO',
      value: synthetic
        ? 'SYNTHETIC: measurements of a reading note'
        : 'Measurements of a reading note',
    },
    { tag: 0x00081111, vr: 'SQ', items: [] },
    { tag: 0x00080070, vr: 'LO', value: '' },
    { tag: 0x00081090, vr: 'LO', value: srText(software.name) },
    { tag: 0x00181020, vr: 'LO', value: srText(software.version) },
  ];
}

/**
 * The seal that the document can carry: a document is VERIFIED only when it is COMPLETE (PS3.3 C.17.2, and dciodvfy
 * takes anything else for an error). The statements tell of a seal that is left out.
 */
export function documentSeal({ completion, seal }: Note): Note['seal'] {
  const canStand = seal !== null && completion === 'COMPLETE' && momentOf(seal.at) !== undefined;
  return canStand ? seal : null;
}

/** SR Document General Module (C.17.2) without the evidence. */
export function documentModule(note: Note, now: string): readonly WriteElement[] {
  const { completion, amendments, deidentified } = note;
  const seal = documentSeal(note);
  const moment = deidentified === undefined ? momentOf(now) : DUMMY_MOMENT;
  if (moment === undefined) throw new RangeError(`no date and time: ${now}`);
  return [
    { tag: 0x00200013, vr: 'IS', value: amendments.length + 1 },
    { tag: 0x0040a491, vr: 'CS', value: completion },
    { tag: 0x0040a493, vr: 'CS', value: seal === null ? 'UNVERIFIED' : 'VERIFIED' },
    { tag: 0x00080023, vr: 'DA', value: moment.date },
    { tag: 0x00080033, vr: 'TM', value: moment.time },
    ...(moment.offset === undefined
      ? []
      : [{ tag: 0x00080201, vr: 'SH' as const, value: moment.offset }]),
    ...(seal === null
      ? []
      : [
          {
            tag: 0x0040a073,
            vr: 'SQ' as const,
            items: [
              [
                { tag: 0x0040a027, vr: 'LO' as const, value: 'Not stated' },
                { tag: 0x0040a030, vr: 'DT' as const, value: dateTimeText(seal.at) },
                { tag: 0x0040a075, vr: 'PN' as const, value: srPersonName(seal.by) },
                { tag: 0x0040a088, vr: 'SQ' as const, items: [] },
              ],
            ],
          },
        ]),
    { tag: 0x0040a372, vr: 'SQ', items: [] },
  ];
}
