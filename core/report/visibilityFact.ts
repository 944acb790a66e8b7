import { formatFixed } from '../format/index.js';
import type { Visibility } from '../note/visibilitySchema.js';

/** What could be seen, as a line of provenance: criterion, contrast and smallest disc of each kernel that has them. */
export function visibilityFact({ k, softHu, softMm, sharpHu, sharpMm }: Visibility): string {
  const kernel = (name: string, hu: number | null, mm: number | null): readonly string[] =>
    hu === null
      ? []
      : [
          mm === null
            ? `${name} kernel ${formatFixed(hu, 0)} HU: no diameter can be told`
            : `${name} kernel ${formatFixed(hu, 0)} HU from ${formatFixed(mm, 1)} mm`,
        ];
  const parts = [...kernel('soft', softHu, softMm), ...kernel('sharp', sharpHu, sharpMm)];
  return `${parts.join('; ')} (Rose’s criterion, k ${k}; an ideal observer’s figure, no promise)`;
}
