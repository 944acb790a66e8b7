import { type WriteElement, writeDataSet, writeFile } from '../../dicom/write/index.js';
import type { Note } from '../../note/schema.js';
import { stableUidOfBytes } from '../../stableUid.js';
import { measurementTable } from '../measurementTable.js';
import { type Code, codeSequence, dcm } from './code.js';
import {
  CONCEPT_NAME,
  codeItem,
  containerElements,
  containerItem,
  contentSequence,
} from './contentItem.js';
import type { ReportContext, ReportOptions } from './context.js';
import { evidence } from './evidence.js';
import { groupItem } from './groupItem.js';
import { imageLibrary } from './imageLibrary.js';
import {
  COMPREHENSIVE_SR,
  documentModule,
  patientModule,
  seriesAndEquipment,
  studyModule,
} from './modules.js';
import { observerItems } from './observerItems.js';
import { ownSchemeDeclaration } from './ownCodes.js';
import { statements } from './statements.js';

const ENGLISH: Code = { value: 'en', scheme: 'RFC5646', meaning: 'English' };

/** The only CT procedure of CID 100; there is none for coronary arteries. */
const PROCEDURE: Code = { value: '25045-6', scheme: 'LN', meaning: 'CT unspecified body region' };

/**
 * A reading note as a DICOM file: Comprehensive SR (PS3.3 A.35.3) with a Measurement Report (PS3.16 TID 1500). The
 * numbers are those of the measurement table. A note that was de-identified makes a document that says so. The same
 * content has the same SOP Instance UID, other content another one.
 *
 * Throws when `now` is no ISO 8601 date and time: that is a mistake of the caller.
 *
 * @param options `pixelOf` and `sopClassOf` from {@link imageLookup}; without them there are no contours, and the
 * document says so
 */
export function toStructuredReport(note: Note, options: ReportOptions): Uint8Array {
  const context: ReportContext = { ...options, note };
  const elements: readonly WriteElement[] = [
    { tag: 0x00080005, vr: 'CS', value: 'ISO_IR 192' },
    { tag: 0x00080016, vr: 'UI', value: COMPREHENSIVE_SR },
    ownSchemeDeclaration(),
    ...patientModule(note),
    ...studyModule(note),
    ...seriesAndEquipment(note),
    ...documentModule(note, options.now),
    ...evidence(context),
    ...content(context),
  ];
  const encoding = { explicitVr: true, littleEndian: true };
  const instance = stableUidOfBytes(writeDataSet(elements, encoding));
  return writeFile([...elements, { tag: 0x00080018, vr: 'UI', value: instance }]);
}

/** The root of the content tree (SR Document Content Module, C.17.3). */
function content(context: ReportContext): readonly WriteElement[] {
  const table = measurementTable(context.note);
  const groups = table.rows.flatMap((row) =>
    row.kernels.map((values) => groupItem(context, row, values)),
  );
  return [
    { tag: 0x0040a040, vr: 'CS', value: 'CONTAINER' },
    codeSequence(CONCEPT_NAME, dcm('126000', 'Imaging Measurement Report')),
    ...containerElements('1500'),
    ...contentSequence([
      codeItem(
        'HAS CONCEPT MOD',
        dcm('121049', 'Language of Content Item and Descendants'),
        ENGLISH,
      ),
      ...observerItems(context),
      codeItem('HAS CONCEPT MOD', dcm('121058', 'Procedure reported'), PROCEDURE),
      ...imageLibrary(context),
      ...(groups.length === 0
        ? []
        : [containerItem(dcm('126010', 'Imaging Measurements'), groups)]),
      statements(context, table),
    ]),
  ];
}
