import type { StoredValues } from '../../dicom/index.js';
import type { FrameDigest, Note } from '../schema.js';
import type { Digest } from './seal.js';

/** A frame that some value of a note was measured on. */
export type ReferencedFrame = Pick<FrameDigest, 'sopInstanceUid' | 'frameNumber'>;

/** The frames that a note's values rest on, each once, in the note's order; none of what lies on an oblique cut. */
export function referencedFrames({
  regions,
  edges = [],
  profiles = [],
  stents = [],
}: Pick<Note, 'regions'> &
  Partial<Pick<Note, 'edges' | 'profiles' | 'stents'>>): readonly ReferencedFrame[] {
  const frames = new Map<string, ReferencedFrame>();
  const values = [
    ...ofKernels(regions, ({ meanHu }) => meanHu !== null),
    ...ofKernels(edges, ({ riseMm }) => riseMm !== null),
    ...ofKernels(profiles, ({ visibleWidthMm }) => visibleWidthMm !== null),
    ...stents.flatMap(({ fit }) => fit?.images ?? []),
  ];
  for (const { sopInstanceUid, frameNumber } of values) {
    if (sopInstanceUid === null) continue;
    frames.set(frameKey({ sopInstanceUid, frameNumber }), { sopInstanceUid, frameNumber });
  }
  return [...frames.values()];
}

function ofKernels<Value>(
  items: readonly { readonly soft: Value | null; readonly sharp: Value | null }[],
  isMeasured: (value: Value) => boolean,
): readonly Value[] {
  return items
    .flatMap(({ soft, sharp }) => [soft, sharp])
    .filter((value) => value !== null)
    .filter(isMeasured);
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
