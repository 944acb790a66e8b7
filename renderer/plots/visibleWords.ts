import { formatFixed } from '../../core/format/index.js';
import type { Kernel } from '../../core/note/index.js';
import { type KernelTexture, visibleContrast, visibleDisc } from '../../core/quality/index.js';
import type { OwnPlace } from '../state/visibleSelectors.js';
import { LEAST_FOR_EYES_HU } from './visibleDrawing.js';

/** What is asked of one kernel. */
export interface AskedOfKernel {
  readonly kernel: Kernel;
  /** Undefined where it could not be measured at all. */
  readonly texture: KernelTexture | null | undefined;
  /** Undefined where this kernel has no such contrast. */
  readonly contrastHu: number | undefined;
  readonly k: number;
}

/** What could be seen on one kernel, as a sentence: from which diameter, or why that can't be told. */
export function visibleSentence({ kernel, texture, contrastHu, k }: AskedOfKernel): string {
  if (!texture) return `On the ${kernel} kernel the noise could not be measured.`;
  if (contrastHu === undefined) return `On the ${kernel} kernel this contrast is not measured.`;
  const disc = visibleDisc(texture, contrastHu, k);
  const defect = `On the ${kernel} kernel a filling defect of ${formatFixed(contrastHu, 0)} HU`;
  if (disc.ok) return `${defect} is visible from ${formatFixed(disc.value, 1)} mm.`;
  switch (disc.refusal.code) {
    case 'none-seen':
    case 'all-seen':
      return `${defect}: ${lowerFirst(disc.refusal.text)}`;
    default:
      return `On the ${kernel} kernel: ${lowerFirst(disc.refusal.text)}`;
  }
}

/** What the sentences are worth, and more where the contrast is below what an eye tells apart. */
export function visibleCaution(contrastsHu: readonly number[]): string {
  const faint =
    contrastsHu.length > 0 && Math.min(...contrastsHu) < LEAST_FOR_EYES_HU
      ? ` Below ${LEAST_FOR_EYES_HU} HU an eye tells nothing apart.`
      : '';
  return `An ideal observer’s figure, no promise.${faint}`;
}

/** What stands behind the sentences, for those who point at them. */
export function visibleMethod(k: number): string {
  return `The smallest disc that stands out ${k} times its noise (Rose’s criterion) for a matched filter that knows its shape and place, from the measured noise spectrum and blur. The contrast is the disc’s own, before blur; the background is even, with the noise of the uniform areas.`;
}

/** Where a region lies against the curve of its kernel. */
export function placeSentences(
  { label, points }: OwnPlace,
  textureOf: (kernel: Kernel) => KernelTexture | null | undefined,
  k: number,
): string {
  return points
    .map(({ kernel, diameterMm, contrastHu }) => {
      const texture = textureOf(kernel);
      const needed = texture ? visibleContrast(texture, diameterMm, k) : undefined;
      const against = needed?.ok
        ? ` needs ${formatFixed(needed.value, 0)} HU and has ${formatFixed(contrastHu, 0)} HU`
        : ` has ${formatFixed(contrastHu, 0)} HU`;
      return `${label}, ${formatFixed(diameterMm, 1)} mm, ${kernel} kernel:${against}.`;
    })
    .join(' ');
}

function lowerFirst(text: string): string {
  return text.charAt(0).toLowerCase() + text.slice(1);
}
