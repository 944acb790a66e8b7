import type { CtImage } from './ctImage.js';
import { TRANSFER_SYNTAX } from './uids.js';

/** True when a slice is decoded from its whole file: one that has a file of its own, or a frame of a deflated one. */
export function isReadWhole({ frame, transferSyntaxUid }: CtImage): boolean {
  return frame === undefined || transferSyntaxUid === TRANSFER_SYNTAX.deflated;
}

/** True when both are the same slice: a UID that the index made up for a file without one is no difference. */
export function isSameInstance(read: CtImage, indexed: CtImage): boolean {
  return read.sopInstanceUid === '' || read.sopInstanceUid === indexed.sopInstanceUid;
}
