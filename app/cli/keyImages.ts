import { type Note, selectStack } from '../../core/note/index.js';
import { encodePng } from '../../core/raster/index.js';
import { type KeySlice, keyImage, keyWindow } from '../../core/report/keyImage/index.js';
import { type Result, success } from '../../core/result.js';
import type { IndexedFolder } from '../host/library/indexFolder.js';
import { readSlices } from './readSlices.js';
import type { VerbContext } from './verb.js';

/**
 * Key images of a note's regions, as PNG files by the regions' identifiers, drawn from the images of a folder as the
 * window draws them. `note` may be one without identity; `original` says where its images are.
 */
export async function keyImages(
  note: Note,
  original: Note,
  folder: IndexedFolder,
  { job, say }: VerbContext,
): Promise<Result<ReadonlyMap<string, Uint8Array>>> {
  const pictures = new Map<string, Uint8Array>();
  const slices = new Map<string, Omit<KeySlice, 'window'>>();
  for (const kernel of ['soft', 'sharp'] as const) {
    const reference = original.pair[kernel];
    const stack = reference === null ? undefined : selectStack(reference, folder.stacks);
    if (stack === undefined) continue;
    if (!stack.ok) {
      say(`No key images on the ${kernel} kernel: ${stack.refusal.text}`);
      continue;
    }
    const wanted = original.regions.flatMap((region) => region[kernel]?.sliceIndex ?? []);
    const read = await readSlices(folder, stack.value, [...new Set(wanted)], job);
    if (!read.ok) return read;
    for (const [index, stored] of read.value.stored) {
      const image = stack.value.slices[index]?.image;
      if (image !== undefined) {
        slices.set(`${kernel} ${index}`, { image, stored });
      }
    }
  }
  for (const region of note.regions) {
    const window = keyWindow(note, region);
    const on = (kernel: 'soft' | 'sharp'): KeySlice | undefined => {
      const slice = slices.get(`${kernel} ${region[kernel]?.sliceIndex}`);
      return slice && { ...slice, window };
    };
    pictures.set(
      region.id,
      encodePng(keyImage(note, region, { soft: on('soft'), sharp: on('sharp') })),
    );
  }
  return success(pictures);
}
