/** SOP Class UIDs that the bench knows by name (PS3.4 B.5). */
export const SOP_CLASS = {
  ctImage: '1.2.840.10008.5.1.4.1.1.2',
  enhancedCtImage: '1.2.840.10008.5.1.4.1.1.2.1',
} as const;

/** Media Storage Directory Storage: the index of a medium (PS3.3 F.2). */
export const DICOMDIR = '1.2.840.10008.1.3.10';

const OTHER_SOP_CLASSES: Readonly<Record<string, string>> = {
  [DICOMDIR]: 'a DICOMDIR',
  '1.2.840.10008.5.1.4.1.1.2.2': 'a converted enhanced CT image',
  '1.2.840.10008.5.1.4.1.1.4': 'an MR image',
  '1.2.840.10008.5.1.4.1.1.7': 'a secondary capture',
  '1.2.840.10008.5.1.4.1.1.7.1': 'a secondary capture',
  '1.2.840.10008.5.1.4.1.1.7.2': 'a secondary capture',
  '1.2.840.10008.5.1.4.1.1.7.3': 'a secondary capture',
  '1.2.840.10008.5.1.4.1.1.7.4': 'a secondary capture',
  '1.2.840.10008.5.1.4.1.1.11.1': 'a presentation state',
  '1.2.840.10008.5.1.4.1.1.66.4': 'a segmentation',
  '1.2.840.10008.5.1.4.1.1.88.11': 'a structured report',
  '1.2.840.10008.5.1.4.1.1.88.22': 'a structured report',
  '1.2.840.10008.5.1.4.1.1.88.33': 'a structured report',
  '1.2.840.10008.5.1.4.1.1.88.34': 'a structured report',
  '1.2.840.10008.5.1.4.1.1.88.59': 'a key object selection',
  '1.2.840.10008.5.1.4.1.1.88.67': 'a radiation dose report',
  '1.2.840.10008.5.1.4.1.1.104.1': 'an encapsulated PDF',
};

/** What a file of another kind is, in words: 'a structured report', or its UID when the kind is not known. */
export function sopClassInWords(uid: string): string {
  return OTHER_SOP_CLASSES[uid] ?? `an object of class ${uid}`;
}

export const TRANSFER_SYNTAX = {
  implicitLittleEndian: '1.2.840.10008.1.2',
  explicitLittleEndian: '1.2.840.10008.1.2.1',
  deflated: '1.2.840.10008.1.2.1.99',
  explicitBigEndian: '1.2.840.10008.1.2.2',
} as const;

const NATIVE: ReadonlySet<string> = new Set(Object.values(TRANSFER_SYNTAX));

const OTHER_TRANSFER_SYNTAXES: Readonly<Record<string, string>> = {
  '1.2.840.10008.1.2.4.50': 'JPEG baseline, 8 bit',
  '1.2.840.10008.1.2.4.51': 'JPEG extended, 12 bit',
  '1.2.840.10008.1.2.4.57': 'JPEG lossless',
  '1.2.840.10008.1.2.4.70': 'JPEG lossless, first-order prediction',
  '1.2.840.10008.1.2.4.80': 'JPEG-LS lossless',
  '1.2.840.10008.1.2.4.81': 'JPEG-LS near-lossless',
  '1.2.840.10008.1.2.4.90': 'JPEG 2000 lossless',
  '1.2.840.10008.1.2.4.91': 'JPEG 2000',
  '1.2.840.10008.1.2.4.94': 'JPIP, pixels elsewhere',
  '1.2.840.10008.1.2.4.95': 'JPIP, pixels elsewhere, deflated',
  '1.2.840.10008.1.2.4.100': 'MPEG-2 video',
  '1.2.840.10008.1.2.4.101': 'MPEG-2 video',
  '1.2.840.10008.1.2.4.102': 'MPEG-4 video',
  '1.2.840.10008.1.2.4.103': 'MPEG-4 video',
  '1.2.840.10008.1.2.4.104': 'MPEG-4 video',
  '1.2.840.10008.1.2.4.105': 'MPEG-4 video',
  '1.2.840.10008.1.2.4.106': 'MPEG-4 video',
  '1.2.840.10008.1.2.4.107': 'HEVC video',
  '1.2.840.10008.1.2.4.108': 'HEVC video',
  '1.2.840.10008.1.2.4.110': 'JPEG XL lossless',
  '1.2.840.10008.1.2.4.111': 'JPEG XL, recompressed JPEG',
  '1.2.840.10008.1.2.4.112': 'JPEG XL',
  '1.2.840.10008.1.2.4.201': 'HTJ2K lossless',
  '1.2.840.10008.1.2.4.202': 'HTJ2K lossless, RPCL',
  '1.2.840.10008.1.2.4.203': 'HTJ2K',
  '1.2.840.10008.1.2.5': 'RLE lossless',
  '1.2.840.113619.5.2': 'implicit VR with big-endian pixels, a private encoding',
};

/** True for the transfer syntaxes whose pixels are not compressed frame by frame (PS3.5 A.1, A.2, A.3, A.5). */
export function isNative(transferSyntaxUid: string): boolean {
  return NATIVE.has(transferSyntaxUid);
}

/** The name of a compressed transfer syntax with its UID, for sentences (PS3.5 A.4). */
export function transferSyntaxInWords(uid: string): string {
  const name = OTHER_TRANSFER_SYNTAXES[uid];
  return name === undefined ? uid : `${name} (${uid})`;
}
