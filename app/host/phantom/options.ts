import {
  DEFAULT_DEMONSTRATION,
  type DemonstrationOptions,
  MOST_SLICES,
} from '../../../core/phantom/demonstration/index.js';
import { type Result, refuse, success } from '../../../core/result.js';
import type { JobOptions } from '../services.js';

/** What may be chosen of the demonstration; what is left out is the usual. */
export interface MakeOptions extends Partial<DemonstrationOptions>, JobOptions {
  /** The built file of the worker thread; by default the one that is built with the program. */
  readonly worker?: string;
}

/** The whole choice, or why there is no such demonstration. */
export function wantedDemonstration(options: MakeOptions): Result<DemonstrationOptions> {
  const {
    seed = DEFAULT_DEMONSTRATION.seed,
    slices = DEFAULT_DEMONSTRATION.slices,
    matrix = DEFAULT_DEMONSTRATION.matrix,
  } = options;
  if (!Number.isInteger(seed))
    return refuse('demonstration-seed', `The seed must be a whole number, not ${seed}.`);
  if (!Number.isInteger(slices) || slices < 1 || slices > MOST_SLICES)
    return refuse(
      'demonstration-slices',
      `The demonstration can have 1 to ${MOST_SLICES} slices, not ${slices}.`,
    );
  if (!Number.isInteger(matrix) || matrix < 32 || matrix > 1024)
    return refuse(
      'demonstration-matrix',
      `The demonstration can have 32 to 1024 rows and columns, not ${matrix}.`,
    );
  return success({ seed, slices, matrix });
}
