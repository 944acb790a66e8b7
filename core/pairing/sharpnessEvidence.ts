import { formatFixed } from '../format/index.js';
import type { Evidence } from '../note/index.js';
import type { Sharpness } from './contract.js';

/** What the measure says of two stacks of one kernel: a copy, or the same with thicker slices or more noise. */
const ONE_KERNEL = ['same kernel', 'thickness alone', 'noise alone'] as const;

/** True when the measure found one and the same kernel in both: no soft and sharp pair. */
export function isSameKernel({ decided, text }: Sharpness): boolean {
  return !decided && ONE_KERNEL.some((words) => text.startsWith(words));
}

/** What the measured sharpness says of the pair. The sentence gives the numbers of soft and sharp, in that order. */
export function sharpnessEvidence(sharpness: Sharpness): Evidence {
  const check = 'sharpness';
  const numbers = numbersText(sharpness);
  if (sharpness.decided) {
    const percent = Math.floor(100 * sharpness.confidence);
    return {
      check,
      state: 'agrees',
      text: `soft and sharp told apart by measure, certain to ${percent} %${numbers}`,
    };
  }
  if (isSameKernel(sharpness)) {
    return { check, state: 'differs', text: `${sharpness.text}: no soft and sharp${numbers}` };
  }
  return {
    check,
    state: 'unknown',
    text: `soft and sharp not told apart: ${sharpness.text}; they stand in the order of the series${numbers}`,
  };
}

function numbersText(sharpness: Sharpness): string {
  const both = (name: string, a: number | null, b: number | null, digits: number, unit: string) =>
    a === null || b === null
      ? []
      : [`${name} ${formatFixed(a, digits)} and ${formatFixed(b, digits)} ${unit}`];
  const parts = [
    ...both('noise', sharpness.noiseSoftHu, sharpness.noiseSharpHu, 1, 'HU'),
    ...both('mean frequency', sharpness.frequencySoft, sharpness.frequencySharp, 2, 'per mm'),
    ...both('edge rise', sharpness.edgeSoftMm, sharpness.edgeSharpMm, 2, 'mm'),
  ];
  return parts.length === 0 ? '' : `: ${parts.join('; ')}`;
}
