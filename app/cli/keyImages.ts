import { type Note, planCuts, planeSlices, planOf, selectStack } from '../../core/note/index.js';
import { encodePng } from '../../core/raster/index.js';
import { type KeySlice, keyImage, keyWindow } from '../../core/report/keyImage/index.js';
import { type Result, success } from '../../core/result.js';
import type { Stack } from '../../core/stack/index.js';
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
  const stacks = new Map<'soft' | 'sharp', Stack>();
  for (const kernel of ['soft', 'sharp'] as const) {
    const reference = original.pair[kernel];
    const stack = reference === null ? undefined : selectStack(reference, folder.stacks);
    if (stack === undefined) continue;
    if (!stack.ok) {
      say(`No key images on the ${kernel} kernel: ${stack.refusal.text}`);
      continue;
    }
    stacks.set(kernel, stack.value);
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
  const cuts = await readCuts(original, stacks, folder, job);
  if (!cuts.ok) return cuts;
  note.regions.forEach((region, index) => {
    const plane = original.regions[index]?.plane;
    const window = keyWindow(note, region);
    const on = (kernel: 'soft' | 'sharp'): KeySlice | undefined => {
      const slice =
        plane === undefined
          ? slices.get(`${kernel} ${region[kernel]?.sliceIndex}`)
          : cuts.value.get(`${kernel} ${plane}`);
      return slice && { ...slice, window };
    };
    pictures.set(
      region.id,
      encodePng(keyImage(note, region, { soft: on('soft'), sharp: on('sharp') })),
    );
  });
  return success(pictures);
}

/** The oblique planes that regions lie on, cut from each stack; by kernel and plane. */
async function readCuts(
  note: Note,
  stacks: ReadonlyMap<'soft' | 'sharp', Stack>,
  folder: IndexedFolder,
  job: VerbContext['job'],
): Promise<Result<ReadonlyMap<string, Omit<KeySlice, 'window'>>>> {
  const found = new Map<string, Omit<KeySlice, 'window'>>();
  const soft = stacks.get('soft');
  const used = note.planes.filter(({ id }) => note.regions.some(({ plane }) => plane === id));
  if (soft === undefined || used.length === 0) return success(found);
  const plan = { ...planOf(note), profiles: [], stents: [], edges: [] };
  for (const [kernel, stack] of stacks) {
    const needed = planeSlices(plan, stack, soft, stacks.get('sharp'));
    const read = await readSlices(folder, stack, [...new Set(needed)], job);
    if (!read.ok) return read;
    const storedOf = (_stack: Stack, index: number) => read.value.stored.get(index);
    const cuts = planCuts(plan, soft, stacks.get('sharp'), storedOf);
    for (const { id } of used) {
      const cut = cuts.cutOf(id, stack);
      if (cut.ok)
        found.set(`${kernel} ${id}`, {
          image: cut.value.stack.slices[0].image,
          stored: cut.value.stored,
        });
    }
  }
  return success(found);
}
