import type { Kernel } from '../../core/note/index.js';
import { measureSharpness } from '../../core/pairing/index.js';
import { FLAGS, type NoiseOfStack } from '../../core/region/index.js';
import type { Stack } from '../../core/stack/index.js';
import type { IndexedFolder } from '../host/library/indexFolder.js';
import type { JobOptions } from '../host/services.js';
import { readSlices } from './readSlices.js';

/**
 * The noise of both kernels of a pair, measured on a few slices; or why there is none. A slice that can't be read is
 * left out of the measure.
 */
export async function noiseOfPair(
  folder: IndexedFolder,
  soft: Stack,
  sharp: Stack,
  { signal }: JobOptions,
): Promise<Readonly<Record<Kernel, NoiseOfStack>>> {
  const { textures } = await measureSharpness(soft, sharp, async (stack, sliceIndex) => {
    const read = await readSlices(folder, stack, [sliceIndex], { ...(signal && { signal }) });
    return read.ok ? read.value.stored.get(sliceIndex) : undefined;
  });
  return textures === undefined
    ? { soft: FLAGS.noStandardErrorFewAreas, sharp: FLAGS.noStandardErrorFewAreas }
    : { soft: textures.first, sharp: textures.second };
}
