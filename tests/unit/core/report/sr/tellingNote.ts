import { createHash } from 'node:crypto';
import type { Note } from '../../../../../core/note/index.js';
import { amendNote, type Digest, verifyNote } from '../../../../../core/note/life/index.js';
import type { Result } from '../../../../../core/result.js';
import { richNote } from '../../note/richNote.js';
import { linesNote } from '../linesNote.js';

export const digest: Digest = async (bytes) => createHash('sha256').update(bytes).digest('hex');

/** Invented values that say who or when; none may be left in an export without identity. */
export const TELLING = [
  'Quillfeather',
  'Ottoline',
  'Žofie',
  '山田',
  'PX-77123',
  '19611124',
  '1961-11-24',
  '20250917',
  '2025-09-17',
  'Follow-up after bypass',
  'ACC4711',
  'Cor 75 % soft of Quillfeather',
  'Iomeron-like 350',
  'Brackwater',
  'Hollis',
  'Fernsby',
  'Marrow',
  'seen by my neighbour',
  'left of the scar',
  'struts of her stent',
  'she moved',
  'near her old lead',
  'same lady',
  'Chief’s lumen',
  'reading-id-0042',
  '2026-01-05',
  '2026-01-06',
  '20260105',
  '093000',
] as const;

function got<T>(result: Result<T>): T {
  if (!result.ok) throw new Error(result.refusal.text);
  return result.value;
}

/** A verified note, amended once and verified again, in which every text of people and files says who or when. */
export async function tellingNote(): Promise<Note> {
  const rich = richNote();
  const { edges, profiles, stents, planes } = linesNote();
  const { soft, sharp } = rich.pair;
  if (sharp === null) throw new Error('the rich note has a pair');
  const told: Note = {
    ...rich,
    id: 'reading-id-0042',
    reader: 'Hollis Brackwater',
    completion: 'COMPLETE',
    study: {
      ...rich.study,
      patientId: 'PX-77123',
      patientName: 'Quillfeather^Ottoline^Žofie=山田',
      patientBirthDate: '19611124',
      patientSex: 'F',
      studyDate: '20250917',
      studyDescription: 'Follow-up after bypass',
      accessionNumber: 'ACC4711',
    },
    conditions: { ...rich.conditions, contrastAgent: 'Iomeron-like 350' },
    pair: {
      ...rich.pair,
      soft: {
        ...soft,
        seriesDescription: 'Cor 75 % soft of Quillfeather',
        findings: [
          { code: 'not-hu', text: 'The file gives its values in “Quillfeather”, not in HU.' },
          { code: 'no-uid', text: `Series ${soft.seriesInstanceUid} was made.` },
        ],
      },
      sharp: { ...sharp, kernelLabel: 'Crisp for Ottoline' },
      evidence: [
        {
          check: 'patient',
          state: 'agrees',
          text: 'same patient: PX-77123 · Quillfeather^Ottoline · born 19611124',
        },
        {
          check: 'acquisition',
          state: 'agrees',
          text: 'same acquisition: number 3, 20250917 093000',
        },
        {
          check: 'frame of reference',
          state: 'agrees',
          text: `frame of reference: ${rich.conditions.frameOfReferenceUid} in both`,
        },
        { check: 'contrast agent', state: 'agrees', text: 'contrast agent: Iomeron-like 350' },
        { check: 'shift', state: 'agrees', text: 'shift 0.02 mm' },
      ],
      overrides: [{ check: 'study', reason: 'same lady' }],
    },
    findings: rich.findings.map((finding) => ({
      ...finding,
      location: 'near her old lead',
      reason: 'she moved',
    })),
    regions: rich.regions.map((region, index) => ({
      ...region,
      label: index === 0 ? 'Chief’s lumen' : region.label,
      place: 'left of the scar',
      quoteReason: 'struts of her stent',
      sharp:
        index !== 1 || region.sharp === null
          ? region.sharp
          : {
              ...region.sharp,
              flags: [
                {
                  code: 'not-one-acquisition',
                  text: 'Not measured here. Not one acquisition: another patient: PX-77123 and PX-2.',
                },
              ],
            },
    })),
    edges: edges.map((edge) => ({ ...edge, label: 'Edge of Quillfeather' })),
    profiles: profiles.map((profile, index) => ({
      ...profile,
      label: 'Hollis’ line',
      definition: index === 0 ? profile.definition : 'Widths as Fernsby reads them.',
      quoteBy: 'reader',
      quoteReason: 'struts of her stent',
    })),
    stents: stents.map((stent) => ({
      ...stent,
      label: 'Stent of 2026-01-05',
      fit:
        stent.fit === null || stent.fit.reason === null
          ? stent.fit
          : { ...stent.fit, reason: { code: 'motion', text: 'Quillfeather moved.' } },
    })),
    planes: planes.map((plane) => ({
      ...plane,
      label: 'Cut by Marrow',
      resampling: 'cubic convolution of 2026-01-05',
    })),
    comment: 'Ottoline Quillfeather, seen by my neighbour.\nSecond line.',
    frames: [
      {
        sopInstanceUid: rich.regions[0]?.soft?.sopInstanceUid ?? '',
        frameNumber: null,
        sha256: 'ab'.repeat(32),
      },
    ],
  };
  const sign = { by: 'Fernsby^Hollis', at: '2026-01-05T12:00:00.000Z' };
  const first = got(await verifyNote(told, sign, digest));
  const opened = got(
    amendNote(
      first,
      { ...first },
      { by: 'Marrow', at: '2026-01-06T08:00:00.000Z', why: 'she moved' },
    ),
  );
  const changed = { ...opened, comment: `${opened.comment} Third.` };
  return got(await verifyNote(changed, { ...sign, at: '2026-01-06T09:00:00.000Z' }, digest));
}
