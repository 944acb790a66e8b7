import { type CtImage, isReadWhole } from '../../../core/dicom/index.js';
import { type Result, success } from '../../../core/result.js';
import type { FrameMaps } from './frameMaps.js';
import { openFrame } from './openFrame.js';
import type { FileStamp } from './readFileHeader.js';
import { readFrameBytes } from './readFrameBytes.js';

/** The bytes that hold one slice. */
export interface CodedFrame {
  readonly bytes: Uint8Array;
  /** True when the bytes are the whole file, false when they are the encoded frame alone. */
  readonly whole: boolean;
}

/** Reads what it takes to decode one slice of an index: of a multi-frame file that frame alone. */
export async function readCodedFrame(
  root: string,
  path: string,
  stamp: FileStamp | undefined,
  image: CtImage,
  maps: FrameMaps,
): Promise<Result<CodedFrame>> {
  if (isReadWhole(image)) {
    const bytes = await readFrameBytes(root, path, { stamp });
    return bytes.ok ? success({ bytes: bytes.value, whole: true }) : bytes;
  }
  const opened = await openFrame(root, path, stamp);
  if (!opened.ok) return opened;
  try {
    const places = await maps.places(opened.value, path, image.frame ?? 0);
    if (!places.ok) return places;
    const bytes = new Uint8Array(places.value.reduce((sum, { length }) => sum + length, 0));
    let at = 0;
    for (const { offset, length } of places.value) {
      const { bytesRead } = await opened.value.file.read(bytes, at, length, offset);
      if (bytesRead < length) throw new Error(`file became shorter: byte ${offset + bytesRead}`);
      at += length;
    }
    return success({ bytes, whole: false });
  } finally {
    await opened.value.file.close();
  }
}
