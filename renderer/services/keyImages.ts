import type { Kernel, Note, NoteRegion } from '../../core/note/index.js';
import type { Raster } from '../../core/raster/index.js';
import { type KeySlice, keyImage, keyWindow } from '../../core/report/keyImage/index.js';
import type { Store } from '../state/store.js';
import type { Cuts } from '../volumes/cuts.js';
import { type SliceSource, whenStored } from './whenStored.js';

/** Where the pixels of key images come from: slices, and oblique cuts. */
export interface KeyImageSource extends SliceSource {
  readonly cuts: Pick<Cuts, 'of'>;
}

/** Draws the key image of a region from the slices that it was measured on; waits until they have been read. */
export async function drawKeyImage(
  store: Store,
  source: KeyImageSource,
  note: Note,
  region: NoteRegion,
  signal: AbortSignal,
): Promise<Raster> {
  const window = keyWindow(note, region);
  const sliceOn = async (kernel: Kernel): Promise<KeySlice | undefined> => {
    if (region.plane !== undefined) return cutOn(region.plane, kernel);
    const index = region[kernel]?.sliceIndex ?? undefined;
    const image =
      index === undefined ? undefined : store.now().pair?.[kernel]?.slices[index]?.image;
    if (index === undefined || image === undefined) return undefined;
    const stored = await whenStored(store, source, kernel, index, signal);
    return stored === undefined ? undefined : { image, stored, window };
  };
  const cutOn = (planeId: string, kernel: Kernel): KeySlice | undefined => {
    const plane = note.planes.find(({ id }) => id === planeId);
    const made = plane && source.cuts.of(plane);
    const cut = made?.ok === true ? made.value[kernel] : undefined;
    return cut && { image: cut.stack.slices[0].image, stored: cut.stored, window };
  };
  const [soft, sharp] = [await sliceOn('soft'), await sliceOn('sharp')];
  return keyImage(note, region, { soft, sharp });
}
