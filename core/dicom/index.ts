export type { Codecs, CodedImage, FrameDecoder } from './compressed/codecs.js';
export * from './ctImage.js';
export * from './decodeImage.js';
export * from './readHeader.js';
export type { StoredValues } from './storedValues.js';
export { SOP_CLASS, sopClassInWords, TRANSFER_SYNTAX, transferSyntaxInWords } from './uids.js';
