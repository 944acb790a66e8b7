import type { Stack } from '../stack/index.js';
import type { Study } from './schema.js';

/** Patient and study as the first slice's file states them; null where it is silent. Raw text: show it as text only. */
export function noteStudy(stack: Stack): Study {
  const { identity } = stack.slices[0].image;
  return {
    studyInstanceUid: identity.studyInstanceUid,
    patientId: identity.patientId ?? null,
    patientName: identity.patientName ?? null,
    patientBirthDate: identity.patientBirthDate ?? null,
    patientSex: identity.patientSex ?? null,
    studyDate: identity.studyDate ?? null,
    studyDescription: identity.studyDescription ?? null,
    accessionNumber: identity.accessionNumber ?? null,
  };
}
