import { type Result, refuse, success } from '../../../core/result.js';
import { openFrame } from './openFrame.js';
import type { FileStamp } from './readFileHeader.js';

/** A part of a file: first byte and number of bytes. */
export interface ByteSpan {
  readonly start: number;
  readonly length: number;
}

/**
 * The bytes of a file of an index, whole or a part.
 *
 * @param root real path of the folder, as the index has it
 * @param path path of the file in the folder, as the index has it
 */
export async function readFrameBytes(
  root: string,
  path: string,
  { stamp, span }: { readonly stamp?: FileStamp | undefined; readonly span?: ByteSpan } = {},
): Promise<Result<Uint8Array<ArrayBuffer>>> {
  const opened = await openFrame(root, path, stamp);
  if (!opened.ok) return opened;
  const { file, size } = opened.value;
  try {
    const { start, length } = span ?? { start: 0, length: size };
    const bytes = new Uint8Array(length);
    let filled = 0;
    while (filled < length) {
      const { bytesRead } = await file.read(bytes, filled, length - filled, start + filled);
      if (bytesRead === 0)
        return refuse('file-changed', 'This file became shorter while it was read.');
      filled += bytesRead;
    }
    return success(bytes);
  } finally {
    await file.close();
  }
}
