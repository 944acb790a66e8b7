import type { Acquisition } from '../dicom/index.js';
import type { Evidence, Link, PairOverride } from '../note/index.js';
import { FLAGS, type Flag } from '../region/index.js';
import { isUnscaled, type Stack } from '../stack/index.js';
import { acquisitionEvidence } from './acquisitionEvidence.js';
import { compareNumbers, compareTexts } from './compareStated.js';
import { geometryEvidence } from './geometryEvidence.js';
import { isOverridden } from './pairVerdict.js';
import { patientEvidence } from './patientEvidence.js';
import { phaseEvidence } from './phaseEvidence.js';

/** What the headers of two stacks say about being one acquisition, and how the plates can be linked. */
export interface HeaderEvidence {
  readonly link: Link;
  readonly evidence: readonly Evidence[];
  /** Set when the two must not be read as a pair, whatever the reader says: another patient, another phase, no common place. */
  readonly refusal?: string;
  /** What differs and makes no pair unless the reader gives a reason: study, frame of reference. */
  readonly needsReason: readonly Evidence[];
}

const SAME_KVP = 0.5;

/** Why nothing may be measured on the second stack of a pair, or undefined when it may. */
export function reasonNotToMeasure({
  link,
  refusal,
}: Pick<HeaderEvidence, 'link' | 'refusal'>): Flag | undefined {
  if (refusal !== undefined) return FLAGS.notOneAcquisition(`${refusal}.`);
  return link === 'index' ? FLAGS.positionsNotComparable : undefined;
}

/**
 * Compares what the files of two stacks state. Nothing is measured here, and labels are never interpreted.
 *
 * @param overrides what the reader answers for with a reason; with one for the frame of reference, positions count as
 * comparable although the files name two frames
 */
export function headerEvidence(
  first: Stack,
  second: Stack,
  overrides: readonly PairOverride[] = [],
): HeaderEvidence {
  const a = first.slices[0].image;
  const b = second.slices[0].image;
  const patient = patientEvidence(a.identity, b.identity);
  const study = compareTexts(
    'study',
    a.identity.studyInstanceUid || undefined,
    b.identity.studyInstanceUid || undefined,
  );
  const frame = compareTexts(
    'frame of reference',
    a.acquisition.frameOfReferenceUid,
    b.acquisition.frameOfReferenceUid,
  );
  const phase = phaseEvidence(first, second);
  const geometry = geometryEvidence(first, second);
  const overlap = geometry.find(({ check }) => check === 'overlap');
  const evidence = [
    patient,
    study,
    frame,
    acquisitionEvidence(first, second),
    phase,
    ...geometry,
    compareNumbers('tube voltage', a.acquisition.kvp, b.acquisition.kvp, SAME_KVP, 'kVp'),
    compareTexts('contrast agent', a.acquisition.contrastAgent, b.acquisition.contrastAgent),
    lossyEvidence(a.acquisition, b.acquisition),
    compareTexts('kernel label', a.acquisition.kernelLabel, b.acquisition.kernelLabel),
  ];
  const needsReason = [study, frame].filter(
    (one) => one.state === 'differs' && !isOverridden(one, overrides),
  );
  const hasComparablePositions = !needsReason.includes(frame);
  const link: Link = hasComparablePositions && overlap?.state !== 'differs' ? 'position' : 'index';
  const other = [patient, phase].find(({ state }) => state === 'differs');
  const refusal =
    other !== undefined
      ? `Not one acquisition: ${other.text}`
      : isUnscaled(first) || isUnscaled(second)
        ? 'Nothing to compare: without a pixel spacing no place on one stack is known on the other'
        : hasComparablePositions && overlap?.state === 'differs'
          ? `Nothing to compare: ${overlap.text}`
          : undefined;
  return { link, evidence, needsReason, ...(refusal !== undefined && { refusal }) };
}

/** Loss in one stack alone makes the two unlike; loss in both leaves open what was lost. */
function lossyEvidence({ lossy: a }: Acquisition, { lossy: b }: Acquisition): Evidence {
  const check = 'lossy compression';
  if (!a && !b) return { check, state: 'agrees', text: 'no lossy compression in either stack' };
  if (a && b) {
    return {
      check,
      state: 'unknown',
      text: 'lossy compression in both stacks: what was lost is not known',
    };
  }
  const both = a ? 'with loss and without' : 'without loss and with';
  return { check, state: 'differs', text: `lossy compression: ${both}` };
}
