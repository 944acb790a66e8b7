import type { WriteElement } from '../../dicom/write/index.js';
import type { Code } from './code.js';

/** Our own coding scheme, for what no published one has a code. Private schemes begin with 99 (PS3.16 section 8.2). */
export const OWN_SCHEME = '99DIPTYCH';

/** Identifies the scheme: stableUid of its name, written out so that it never changes. */
const OWN_SCHEME_UID = '2.25.336553746648606168288501188345864865847';

function own(value: string, meaning: string): Code {
  return { value, scheme: OWN_SCHEME, meaning };
}

/** Every private code. What a value means is its Code Meaning; a value is never used again for another meaning. */
export const OWN = {
  cnr: own('CNR', 'Contrast to noise ratio'),
  pixelCount: own('N', 'Number of pixels with their centre inside'),
  sampledArea: own('SAMPLEDAREA', 'Number of pixels inside times the area of a pixel'),
  standardError: own('STDERR', 'Standard error of the mean, by noise alone'),
  placement: own('PLACEMENT', 'Placement sensitivity of the mean'),
  bandShare: own('BANDSHARE', 'Share of pixels in a density band'),
  formula: own('FORMULA', 'Formula'),
  kernel: own('KERNEL', 'Kernel of the pair'),
  soft: own('SOFT', 'Soft kernel'),
  sharp: own('SHARP', 'Sharp kernel'),
  kernelLabel: own('KERNELLABEL', 'Kernel label as in the files'),
  role: own('ROLE', 'Role of the region'),
  wall: own('WALL', 'Vessel wall'),
  reference: own('REFERENCE', 'Reference region'),
  nonCalcifiedPlaque: own('NCPLAQUE', 'Non-calcified plaque'),
  mixedPlaque: own('MIXEDPLAQUE', 'Mixed plaque'),
  referenceSite: own('REFSITE', 'Reference site'),
  assessability: own('ASSESSABILITY', 'Assessability'),
  reason: own('REASON', 'Reason'),
  detail: own('DETAIL', 'Detail of the finding'),
  place: own('PLACE', 'Place in the finding'),
  quoted: own('QUOTED', 'Quoted value'),
  operands: own('OPERANDS', 'What is compared'),
  slice: own('SLICE', 'Slice measured'),
  remark: own('REMARK', 'Remark'),
  noContour: own('NOCONTOUR', 'Contour not given'),
  provenance: own('PROVENANCE', 'Provenance'),
  caution: own('CAUTION', 'Caution'),
  identity: own('IDENTITY', 'Identity of the patient in this document'),
  amendment: own('AMENDMENT', 'Amendment'),
  absentSegments: own('ABSENT', 'Coronary segments that are absent'),
} as const;

/** Coding Scheme Identification Sequence (0008,0110): declares the private scheme (PS3.3 C.12.1.1.7). */
export function ownSchemeDeclaration(): WriteElement {
  return {
    tag: 0x00080110,
    vr: 'SQ',
    items: [
      [
        { tag: 0x00080102, vr: 'SH', value: OWN_SCHEME },
        { tag: 0x0008010c, vr: 'UI', value: OWN_SCHEME_UID },
        { tag: 0x00080115, vr: 'ST', value: 'Diptych private codes' },
        { tag: 0x00080103, vr: 'SH', value: '1' },
        { tag: 0x00080116, vr: 'ST', value: 'The authors of Diptych' },
      ],
    ],
  };
}
