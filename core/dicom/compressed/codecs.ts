/** What a code stream decodes to: samples as the code stream has them, and how it describes them. */
export interface CodedImage {
  /** One component, 16 bits a sample, row after row; sign as {@link signed} says. */
  readonly samples: Uint16Array | Int16Array;
  readonly width: number;
  readonly height: number;
  readonly bitsPerSample: number;
  /** Undefined where the coding does not carry a sign. */
  readonly signed?: boolean;
}

/** Decodes one frame; rejects with an Error when the code stream is damaged. */
export type FrameDecoder = (codeStream: Uint8Array) => CodedImage;

/**
 * The decoders of a host, each loaded when it is first needed: the page's workers load them by URL, Node from
 * its packages. Core holds no decoder of its own but RLE.
 */
export interface Codecs {
  jpegLossless(): Promise<FrameDecoder>;
  jpegLs(): Promise<FrameDecoder>;
  jpeg2000(): Promise<FrameDecoder>;
  highThroughputJpeg2000(): Promise<FrameDecoder>;
}
