import type { Acquisition } from '../dicom/index.js';
import type { Stack } from '../stack/index.js';
import type { Conditions } from './schema.js';

/**
 * Conditions of the acquisition. Where both stacks state a condition and differ, or only one states it, the
 * soft stack's statement stands when it has one; the difference itself is in the evidence of the pair.
 */
export function noteConditions(soft: Stack, sharp?: Stack): Conditions {
  const stated = [soft, sharp].flatMap((stack) =>
    stack === undefined ? [] : [stack.slices[0].image.acquisition],
  );
  return {
    kvp: first(stated, 'kvp'),
    phasePercent: first(stated, 'phasePercent'),
    contrastAgent: first(stated, 'contrastAgent'),
    thicknessMm: first(stated, 'thicknessMm'),
    frameOfReferenceUid: first(stated, 'frameOfReferenceUid'),
  };
}

function first<Key extends keyof Acquisition>(
  stated: readonly Acquisition[],
  key: Key,
): NonNullable<Acquisition[Key]> | null {
  return stated.find((acquisition) => acquisition[key] !== undefined)?.[key] ?? null;
}
