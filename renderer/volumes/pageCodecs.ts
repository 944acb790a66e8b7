import charlsWasm from '@cornerstonejs/codec-charls/decodewasm?url';
import openJpegWasm from '@cornerstonejs/codec-openjpeg/decodewasm?url';
import openJphWasm from '@cornerstonejs/codec-openjph/wasm?url';
import { losslessFrameDecoder, wasmFrameDecoder } from '../../core/dicom/compressed/adapters.js';
import type { Codecs, FrameDecoder } from '../../core/dicom/index.js';

/** Where a decoder's WebAssembly is, and silence: the decoders print what they think of a stream. */
const options = (url: string): object => ({
  locateFile: () => url,
  print: () => {},
  printErr: () => {},
});

/** Loads once, when first asked. */
function once(load: () => Promise<FrameDecoder>): () => Promise<FrameDecoder> {
  let loaded: Promise<FrameDecoder> | undefined;
  return () => {
    loaded ??= load();
    return loaded;
  };
}

/** Decoders for the page's workers. Each is fetched when the first slice needs it. */
export const pageCodecs: Codecs = {
  jpegLossless: once(async () => {
    const { Decoder } = await import('jpeg-lossless-decoder-js');
    return losslessFrameDecoder(() => new Decoder());
  }),
  jpegLs: once(async () => {
    const { default: create } = await import('@cornerstonejs/codec-charls/decodewasmjs');
    const { JpegLSDecoder } = await create(options(charlsWasm));
    return wasmFrameDecoder(() => new JpegLSDecoder());
  }),
  jpeg2000: once(async () => {
    const { default: create } = await import('@cornerstonejs/codec-openjpeg/decodewasmjs');
    const { J2KDecoder } = await create(options(openJpegWasm));
    return wasmFrameDecoder(() => new J2KDecoder());
  }),
  highThroughputJpeg2000: once(async () => {
    const { default: create } = await import('@cornerstonejs/codec-openjph/wasmjs');
    const { HTJ2KDecoder } = await create(options(openJphWasm));
    return wasmFrameDecoder(() => new HTJ2KDecoder());
  }),
};
