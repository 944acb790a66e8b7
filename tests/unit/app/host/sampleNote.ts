import type { Note } from '../../../../core/note/index.js';

/** An invented note with nothing measured, of the given study, reader and comment. */
export function sampleNote(
  change: { readonly study?: string; readonly reader?: string; readonly comment?: string } = {},
): Note {
  const study = change.study ?? '2.25.77001.1';
  return {
    format: 'diptych-note',
    version: 1,
    id: 'note-1',
    software: { name: 'Diptych', version: '0.0.0' },
    createdAt: '2024-01-02T03:04:05Z',
    changedAt: '2024-01-02T03:04:05Z',
    reader: change.reader ?? 'R. Eader',
    completion: 'PARTIAL',
    verification: 'UNVERIFIED',
    synthetic: true,
    study: {
      studyInstanceUid: study,
      patientId: 'SYNTHETIC-1',
      patientName: null,
      patientBirthDate: null,
      patientSex: null,
      studyDate: null,
      studyDescription: null,
      accessionNumber: null,
    },
    pair: {
      soft: {
        seriesInstanceUid: `${study}.2`,
        key: `${study}.2`,
        seriesNumber: 2,
        seriesDescription: null,
        kernelLabel: null,
        pixelSpacingMm: [0.5, 0.5],
        sliceSpacingMm: 0.5,
        thicknessMm: 0.6,
        slices: 3,
        unit: 'HU',
        lossy: false,
        findings: [],
      },
      sharp: null,
      link: 'position',
      overrides: [],
      evidence: [],
    },
    conditions: {
      kvp: 120,
      phasePercent: null,
      contrastAgent: null,
      thicknessMm: 0.6,
      frameOfReferenceUid: null,
    },
    noise: 'reference',
    findings: [],
    regions: [],
    contrasts: [],
    comment: change.comment ?? '',
  };
}
