import type { Kernel } from '../../core/note/index.js';
import { FLAGS, type NoiseOfStack } from '../../core/region/index.js';
import type { AppState } from './appState.js';

/**
 * What the standard errors on a kernel rest on now: what was just measured of the pair, else what the note has kept of
 * it, else why there is none. As long as nothing new is known it is the same object.
 */
export function noiseOfKernel(
  { pair, note, assessment }: Pick<AppState, 'pair' | 'note' | 'assessment'>,
  kernel: Kernel,
): NoiseOfStack {
  const stack = pair?.[kernel];
  if (pair?.sharp === undefined || stack === undefined) return FLAGS.noStandardErrorAlone;
  if (assessment.kind === 'done')
    return assessment.measured.textures[stack.key] ?? FLAGS.noStandardErrorFewAreas;
  const kept = note?.pair[kernel]?.key === stack.key ? note.pair.texture[kernel] : null;
  if (kept !== null) return kept;
  return assessment.kind === 'failed' ? FLAGS.noStandardError : FLAGS.noStandardErrorYet;
}
