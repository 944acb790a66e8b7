import { formatFixed, formatQuantity } from '../../core/format/index.js';
import { length } from '../../core/geometry/index.js';
import type { Evidence } from '../../core/note/index.js';
import type { MeasuredShift, Sharpness } from '../../core/pairing/index.js';

/** 'thickness differs · phase unknown': what speaks against a pair, by name. */
export function doubtWords(doubts: readonly Evidence[]): string {
  return doubts.map(({ check, state }) => `${check} ${state}`).join(' · ');
}

/** 'shift 0.02 mm'; undefined where it could not be measured. */
export function shiftWords({ shiftMm }: Pick<MeasuredShift, 'shiftMm'>): string | undefined {
  return shiftMm === null ? undefined : `shift ${formatQuantity(length(shiftMm), 'lengthMm')} mm`;
}

/** 'noise 6.1 → 26.9 HU' and 'texture 0.21 → 0.47 /mm', those of the two that were measured. */
export function sharpnessWords(sharpness: Sharpness): readonly string[] {
  const noise = arrow(sharpness.noiseSoftHu, sharpness.noiseSharpHu, 1);
  const texture = arrow(sharpness.frequencySoft, sharpness.frequencySharp, 2);
  return [
    ...(noise === undefined ? [] : [`noise ${noise} HU`]),
    ...(texture === undefined ? [] : [`texture ${texture} /mm`]),
  ];
}

function arrow(soft: number | null, sharp: number | null, digits: number): string | undefined {
  if (soft === null || sharp === null) return undefined;
  return `${formatFixed(soft, digits)} → ${formatFixed(sharp, digits)}`;
}
