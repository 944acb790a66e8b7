import { dot, gridNormal } from '../geometry/index.js';
import type { Evidence, Link } from '../note/index.js';
import { FLAGS, type Flag } from '../region/index.js';
import type { Stack } from '../stack/index.js';
import { tiltDegrees } from '../stack/index.js';

/** What the headers of two stacks say about being one acquisition, and how the plates can be linked. */
export interface HeaderEvidence {
  readonly link: Link;
  readonly evidence: readonly Evidence[];
  /** Set when the two must not be read as a pair: another patient, another phase, no common place. */
  readonly refusal?: string;
}

const PHASE_TOLERANCE_PERCENT = 0.5;
const THICKNESS_TOLERANCE_MM = 0.01;
const TILT_TOLERANCE_DEG = 0.2;

/** Why nothing may be measured on the second stack of a pair, or undefined when it may. */
export function reasonNotToMeasure({ link, refusal }: HeaderEvidence): Flag | undefined {
  if (refusal !== undefined) return FLAGS.notOneAcquisition(`${refusal}.`);
  return link === 'index' ? FLAGS.positionsNotComparable : undefined;
}

/** Compares what the files of two stacks state. Nothing is measured here, and labels are never interpreted. */
export function headerEvidence(soft: Stack, sharp: Stack): HeaderEvidence {
  const a = soft.slices[0].image;
  const b = sharp.slices[0].image;
  const patient = compare(
    'patient',
    [a.identity.patientId, a.identity.patientName].filter(Boolean).join(' · ') || undefined,
    [b.identity.patientId, b.identity.patientName].filter(Boolean).join(' · ') || undefined,
  );
  const study = compare('study', a.identity.studyInstanceUid, b.identity.studyInstanceUid);
  const frame = compare(
    'frame of reference',
    a.acquisition.frameOfReferenceUid,
    b.acquisition.frameOfReferenceUid,
  );
  const phase = near(
    'phase',
    a.acquisition.phasePercent,
    b.acquisition.phasePercent,
    PHASE_TOLERANCE_PERCENT,
    '%',
  );
  const overlap = overlapEvidence(soft, sharp);
  const evidence = [
    patient,
    study,
    frame,
    compare(
      'acquisition',
      a.acquisition.acquisitionNumber?.toString(),
      b.acquisition.acquisitionNumber?.toString(),
    ),
    phase,
    overlap,
    near('tilt', tiltDegrees(soft.slices), tiltDegrees(sharp.slices), TILT_TOLERANCE_DEG, '°'),
    near(
      'thickness',
      a.acquisition.thicknessMm,
      b.acquisition.thicknessMm,
      THICKNESS_TOLERANCE_MM,
      'mm',
    ),
    near('tube voltage', a.acquisition.kvp, b.acquisition.kvp, 0.5, 'kVp'),
    compare('kernel label', a.acquisition.kernelLabel, b.acquisition.kernelLabel),
  ];
  const link: Link =
    frame.state !== 'differs' && overlap.state !== 'differs' ? 'position' : 'index';
  const refusal = [patient, phase].find(({ state }) => state === 'differs');
  return {
    link,
    evidence,
    ...(refusal && { refusal: `Not one acquisition: ${refusal.text}` }),
  };
}

function compare(check: string, a: string | undefined, b: string | undefined): Evidence {
  if (a === undefined || b === undefined) {
    return {
      check,
      state: 'unknown',
      text: `${check}: ${a ?? 'not stated'} and ${b ?? 'not stated'}`,
    };
  }
  return a === b
    ? { check, state: 'agrees', text: `same ${check}: ${a}` }
    : { check, state: 'differs', text: `another ${check}: ${a} and ${b}` };
}

function near(
  check: string,
  a: number | undefined,
  b: number | undefined,
  tolerance: number,
  unit: string,
): Evidence {
  const say = (value: number | undefined): string =>
    value === undefined ? 'not stated' : `${Number(value.toFixed(2))} ${unit}`;
  if (a === undefined || b === undefined) {
    return { check, state: 'unknown', text: `${check}: ${say(a)} and ${say(b)}` };
  }
  return Math.abs(a - b) <= tolerance
    ? { check, state: 'agrees', text: `same ${check}: ${say(a)}` }
    : { check, state: 'differs', text: `another ${check}: ${say(a)} and ${say(b)}` };
}

/** Whether the two share a range along the normal; stacks that lean against each other share none. */
function overlapEvidence(soft: Stack, sharp: Stack): Evidence {
  const normalsAgree = sameNormal(soft, sharp);
  const [a, b] = [range(soft), range(sharp)];
  const common = Math.min(a.to, b.to) - Math.max(a.from, b.from);
  const check = 'overlap';
  if (!normalsAgree) {
    return { check, state: 'differs', text: 'the slices of the two stacks are not parallel' };
  }
  return common >= 0
    ? { check, state: 'agrees', text: `${common.toFixed(1)} mm of slices in common` }
    : { check, state: 'differs', text: 'no slices in common' };
}

function range({ slices }: Stack): { from: number; to: number } {
  return { from: slices[0].alongMm, to: slices[slices.length - 1]?.alongMm ?? slices[0].alongMm };
}

function sameNormal(a: Stack, b: Stack): boolean {
  const [x, y] = [a.slices[0].image.grid, b.slices[0].image.grid];
  return dot(gridNormal(x), gridNormal(y)) > 1 - 1e-5;
}
