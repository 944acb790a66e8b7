/** How a note was de-identified, in sentences: every export of it says them. */
export const METHOD = [
  'DICOM PS3.15 Annex E, Basic Application Confidentiality Profile (113100) with the Clean Structured Content Option (113104).',
  'Taken out: names, identifiers, dates and times, sex, descriptions, accession number, contrast agent, and all that people wrote: labels, places, reasons, comment, the names of reader and verifier.',
  'Replaced: the UIDs of study, series, images and frame of reference, each by the same new one throughout.',
  'Taken out with them: the verification and its seal, which hold for the note with identity only; amendments; digests of the pixels.',
  'Kept: kernel labels as in the files, conditions of the acquisition, geometry, and every number. Who has the images themselves could find them again by the numbers.',
] as const;

/** Checks of a pair whose sentences say nothing of who and when, once UIDs in them are replaced. Of others the state alone is kept. */
export const CLEAN_CHECKS: ReadonlySet<string> = new Set([
  'study',
  'frame of reference',
  'phase',
  'orientation',
  'overlap',
  'slice spacing',
  'thickness',
  'pixel spacing',
  'field of view',
  'tilt',
  'tube voltage',
  'lossy compression',
  'kernel label',
  'shift',
  'sharpness',
]);
