import type { StoredValues } from '../../dicom/index.js';
import type { FrameDigest, Note } from '../schema.js';
import type { Digest } from './seal.js';

/** A frame that some value of a note was measured on. */
export type ReferencedFrame = Pick<FrameDigest, 'sopInstanceUid' | 'frameNumber'>;

/** The frames that a note's values rest on, each once, in the note's order. */
export function referencedFrames({
  regions,
  edges = [],
}: Pick<Note, 'regions'> & Partial<Pick<Note, 'edges'>>): readonly ReferencedFrame[] {
  const frames = new Map<string, ReferencedFrame>();
  for (const { soft, sharp } of regions) {
    for (const value of [soft, sharp]) {
      if (value === null || value.sopInstanceUid === null || value.meanHu === null) continue;
      const { sopInstanceUid, frameNumber } = value;
      frames.set(frameKey({ sopInstanceUid, frameNumber }), { sopInstanceUid, frameNumber });
    }
  }
  for (const value of edges.flatMap(({ soft, sharp }) => [soft, sharp])) {
    if (value === null || value.sopInstanceUid === null || value.riseMm === null) continue;
    const { sopInstanceUid, frameNumber } = value;
    frames.set(frameKey({ sopInstanceUid, frameNumber }), { sopInstanceUid, frameNumber });
  }
  return [...frames.values()];
}

/** One text for each frame: images of a series and frames of a multi-frame image alike. */
export function frameKey({ sopInstanceUid, frameNumber }: ReferencedFrame): string {
  return frameNumber === null ? sopInstanceUid : `${sopInstanceUid}#${frameNumber}`;
}

/**
 * SHA-256 of a frame's stored values, 16 bit little endian, row after row, after decoding: another transfer syntax
 * of the same pixels is no change, one other pixel is.
 */
export function pixelDigest(stored: StoredValues, digest: Digest): Promise<string> {
  const bytes = new Uint8Array(stored.length * 2);
  const view = new DataView(bytes.buffer);
  for (let index = 0; index < stored.length; index += 1) {
    view.setUint16(index * 2, (stored[index] as number) & 0xffff, true);
  }
  return digest(bytes);
}
