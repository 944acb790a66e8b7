import type { Note } from '../note/schema.js';
import { STENT_CAUTION } from './stentSentence.js';

/** What every export says, at its head and at its foot. Own wording of common caution for a measuring aid. */
export const CAUTIONS = [
  'Diptych is a measuring aid under investigation. It is not a medical device, and not for primary diagnosis, choice of treatment or emergencies.',
  'A licensed physician checks each value against the source images and owns the report. Local protocols decide.',
  'Values depend on scanner, kernel, tube voltage, contrast, patient size and phase. Thresholds hold only for the tube voltage and kernel that they were published for; nothing is converted.',
  'Edge enhancement of a sharp kernel shifts density, and blooming narrows a lumen on both kernels. A low value inside a stent does not prove restenosis.',
  'Compare only values with the same formula, kernel, tube voltage and software version.',
] as const;

/** Stands on every export of a synthetic study. */
export const SYNTHETIC_CAUTION =
  'SYNTHETIC: computed images of no patient. For demonstration only.';

/** Cautions that hold for a note, the most urgent first; that of fitted stents where it has some. */
export function cautionsOf({
  synthetic,
  stents,
}: Pick<Note, 'synthetic' | 'stents'>): readonly string[] {
  return [
    ...(synthetic ? [SYNTHETIC_CAUTION] : []),
    ...CAUTIONS,
    ...(stents.length > 0 ? [STENT_CAUTION] : []),
  ];
}
