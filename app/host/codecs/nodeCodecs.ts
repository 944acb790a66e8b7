import { losslessFrameDecoder, wasmFrameDecoder } from '../../../core/dicom/compressed/adapters.js';
import type { Codecs, FrameDecoder } from '../../../core/dicom/index.js';

/** The decoders print what they think of a stream; its result tells as much. */
const QUIET = { print: () => {}, printErr: () => {} };

/** Loads once, when first asked. */
function once(load: () => Promise<FrameDecoder>): () => Promise<FrameDecoder> {
  let loaded: Promise<FrameDecoder> | undefined;
  return () => {
    loaded ??= load();
    return loaded;
  };
}

/** Decoders for Node: worker threads and the command line. */
export const nodeCodecs: Codecs = {
  jpegLossless: once(async () => {
    const { Decoder } = await import('jpeg-lossless-decoder-js');
    return losslessFrameDecoder(() => new Decoder());
  }),
  jpegLs: once(async () => {
    const { default: create } = await import('@cornerstonejs/codec-charls/decodewasmjs');
    const { JpegLSDecoder } = await create(QUIET);
    return wasmFrameDecoder(() => new JpegLSDecoder());
  }),
  jpeg2000: once(async () => {
    const { default: create } = await import('@cornerstonejs/codec-openjpeg/decodewasmjs');
    const { J2KDecoder } = await create(QUIET);
    return wasmFrameDecoder(() => new J2KDecoder());
  }),
  highThroughputJpeg2000: once(async () => {
    const { default: create } = await import('@cornerstonejs/codec-openjph/wasmjs');
    const { HTJ2KDecoder } = await create(QUIET);
    return wasmFrameDecoder(() => new HTJ2KDecoder());
  }),
};
