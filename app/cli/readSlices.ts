import { decodeImage, type StoredValues } from '../../core/dicom/index.js';
import { type Result, success } from '../../core/result.js';
import type { Stack } from '../../core/stack/index.js';
import { nodeCodecs } from '../host/codecs/nodeCodecs.js';
import { cancelled } from '../host/library/cancelled.js';
import type { IndexedFolder } from '../host/library/indexFolder.js';
import { readFrameBytes } from '../host/library/readFrameBytes.js';
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
  const stored = new Map<number, StoredValues>();
  const problems: { file: string; text: string }[] = [];
  for (const [done, index] of indices.entries()) {
    if (signal?.aborted) return cancelled();
    onProgress?.({ done, total: indices.length, text: 'Reading slices' });
    const slice = stack.slices[index];
    const path = slice === undefined ? undefined : folder.paths[slice.fileId];
    if (slice === undefined || path === undefined) throw new Error(`no such slice: ${index}`);
    const bytes = await readFrameBytes(folder.root, path, { stamp: folder.stamps[slice.fileId] });
    const decoded = bytes.ok
      ? await decodeImage(bytes.value, { frame: slice.image.frame, codecs: nodeCodecs })
      : bytes;
    if (!decoded.ok) problems.push({ file: slice.file, text: decoded.refusal.text });
    else if (decoded.value.image.sopInstanceUid !== slice.image.sopInstanceUid) {
      problems.push({ file: slice.file, text: 'The file changed while it was read.' });
    } else stored.set(index, decoded.value.stored);
  }
  return success({ stored, problems });
}
