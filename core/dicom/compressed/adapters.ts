import type { CodedImage, FrameDecoder } from './codecs.js';

/** What the WebAssembly decoders of JPEG-LS, JPEG 2000 and HTJ2K have in common. */
export interface WasmFrameDecoder {
  getEncodedBuffer(size: number): Uint8Array;
  getDecodedBuffer(): Uint8Array;
  decode(): void;
  getFrameInfo(): {
    readonly width: number;
    readonly height: number;
    readonly bitsPerSample: number;
    readonly componentCount: number;
    readonly isSigned?: boolean;
  };
  /** Frees the decoder's memory, which no garbage collector does. */
  delete(): void;
}

/** A frame decoder of a WebAssembly module. The result is copied out: the module's memory is used again. */
export function wasmFrameDecoder(create: () => WasmFrameDecoder): FrameDecoder {
  return (codeStream) => {
    const decoder = create();
    try {
      decoder.getEncodedBuffer(codeStream.length).set(codeStream);
      decoder.decode();
      const { width, height, bitsPerSample, componentCount, isSigned } = decoder.getFrameInfo();
      const bytes = decoder.getDecodedBuffer();
      const bytesPerSample = bitsPerSample <= 8 ? 1 : 2;
      // A cut JPEG 2000 stream is not refused by its decoder; it just gives nothing.
      if (componentCount !== 1 || bytes.length !== width * height * bytesPerSample) {
        throw new Error(`decoded bytes: ${bytes.length}`);
      }
      const samples = bytesPerSample === 1 ? Uint16Array.from(bytes) : wordsOf(bytes);
      return {
        samples,
        width,
        height,
        bitsPerSample,
        ...(isSigned !== undefined && { signed: isSigned }),
      };
    } finally {
      decoder.delete();
    }
  };
}

function wordsOf(bytes: Uint8Array): Uint16Array {
  const words = new Uint16Array(bytes.length / 2);
  new Uint8Array(words.buffer).set(bytes);
  return words;
}

/** What the JPEG lossless decoder gives after decoding. */
export interface LosslessDecoder {
  decode(
    buffer: ArrayBufferLike,
    offset: number,
    length: number,
    bytesPerSample: number,
  ): Uint8Array | Uint16Array;
  readonly frame: {
    readonly dimX: number;
    readonly dimY: number;
    readonly precision: number;
    readonly numComp: number;
  };
  /** Predictions of the next sample of a component: from its left, from above, and number 7 of ITU-T T.81 table H.1. */
  getPreviousX(component?: number): number;
  getPreviousY(component?: number): number;
  select7(component?: number): number;
}

/** A frame decoder of the JPEG lossless decoder, which is plain JavaScript. */
export function losslessFrameDecoder(create: () => LosslessDecoder): FrameDecoder {
  return (codeStream): CodedImage => {
    const decoder = create();
    // Its own keeps the half of an odd sum, which makes samples that wrap around wrong by one.
    decoder.select7 = (component = 0) =>
      (decoder.getPreviousX(component) + decoder.getPreviousY(component)) >> 1;
    const { buffer, byteOffset, length } = codeStream;
    const decoded = decoder.decode(buffer, byteOffset, length, 2);
    const { dimX, dimY, precision, numComp } = decoder.frame;
    if (numComp !== 1) throw new Error(`components: ${numComp}`);
    const samples =
      decoded instanceof Uint16Array ? decoded : new Uint16Array(decoded.buffer, 0, dimX * dimY);
    return { samples, width: dimX, height: dimY, bitsPerSample: precision };
  };
}
