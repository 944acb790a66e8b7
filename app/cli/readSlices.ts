import {
  type CtImage,
  decodeFrameBytes,
  decodeImage,
  isSameInstance,
  type StoredValues,
} from '../../core/dicom/index.js';
import { type Result, refuse, success } from '../../core/result.js';
import type { Stack } from '../../core/stack/index.js';
import { nodeCodecs } from '../host/codecs/nodeCodecs.js';
import { cancelled } from '../host/library/cancelled.js';
import { createFrameMaps } from '../host/library/frameMaps.js';
import type { IndexedFolder } from '../host/library/indexFolder.js';
import { readCodedFrame } from '../host/library/readCodedFrame.js';
import type { JobOptions } from '../host/services.js';

/** Stored values of the slices that were asked for, and what could not be read. */
export interface ReadSlices {
  readonly stored: ReadonlyMap<number, StoredValues>;
  readonly problems: readonly { readonly file: string; readonly text: string }[];
}

/** Reads and decodes some slices of a stack. One that can't be read is told, and the others go on. */
export async function readSlices(
  folder: IndexedFolder,
  stack: Stack,
  indices: readonly number[],
  { signal, onProgress }: JobOptions,
): Promise<Result<ReadSlices>> {
  const maps = createFrameMaps();
  const stored = new Map<number, StoredValues>();
  const problems: { file: string; text: string }[] = [];
  for (const [done, index] of indices.entries()) {
    if (signal?.aborted) return cancelled();
    onProgress?.({ done, total: indices.length, text: 'Reading slices' });
    const slice = stack.slices[index];
    const path = slice === undefined ? undefined : folder.paths[slice.fileId];
    if (slice === undefined || path === undefined) throw new Error(`no such slice: ${index}`);
    const { image } = slice;
    const stamp = folder.stamps[slice.fileId];
    const bytes = await readCodedFrame(folder.root, path, stamp, image, maps);
    const decoded = !bytes.ok
      ? bytes
      : bytes.value.whole
        ? await decodeWhole(bytes.value.bytes, image)
        : await decodeFrameBytes(bytes.value.bytes, image, nodeCodecs);
    if (decoded.ok) stored.set(index, decoded.value);
    else problems.push({ file: slice.file, text: decoded.refusal.text });
  }
  return success({ stored, problems });
}

/** A file that was read whole says itself what it holds; that must be what the index has. */
async function decodeWhole(bytes: Uint8Array, image: CtImage): Promise<Result<StoredValues>> {
  const decoded = await decodeImage(bytes, { frame: image.frame, codecs: nodeCodecs });
  if (!decoded.ok) return decoded;
  return isSameInstance(decoded.value.image, image)
    ? success(decoded.value.stored)
    : refuse('file-changed', 'The file changed while it was read.');
}
