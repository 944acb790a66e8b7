import type { Kernel, Note, NoteRegion } from '../../core/note/index.js';
import type { Raster } from '../../core/raster/index.js';
import { type KeySlice, keyImage, keyWindow } from '../../core/report/keyImage/index.js';
import { stackOf } from '../state/selectors.js';
import type { Store } from '../state/store.js';
import { type SliceSource, whenStored } from './whenStored.js';

/** Draws the key image of a region from the slices that it was measured on; waits until they have been read. */
export async function drawKeyImage(
  store: Store,
  source: SliceSource,
  note: Note,
  region: NoteRegion,
  signal: AbortSignal,
): Promise<Raster> {
  const window = keyWindow(note, region);
  const sliceOn = async (kernel: Kernel): Promise<KeySlice | undefined> => {
    const index = region[kernel]?.sliceIndex ?? undefined;
    const image =
      index === undefined ? undefined : stackOf(store.now(), kernel)?.slices[index]?.image;
    if (index === undefined || image === undefined) return undefined;
    const stored = await whenStored(store, source, kernel, index, signal);
    return stored === undefined ? undefined : { image, stored, window };
  };
  const [soft, sharp] = [await sliceOn('soft'), await sliceOn('sharp')];
  return keyImage(note, region, { soft, sharp });
}
