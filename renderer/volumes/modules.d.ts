/** The decoder packages ship no types; these are the parts that are used. */
declare module '@cornerstonejs/codec-charls/decodewasmjs' {
  const create: (options: object) => Promise<{
    JpegLSDecoder: new () => import('../../../core/dicom/compressed/adapters.js').WasmFrameDecoder;
  }>;
  export default create;
}
declare module '@cornerstonejs/codec-openjpeg/decodewasmjs' {
  const create: (options: object) => Promise<{
    J2KDecoder: new () => import('../../../core/dicom/compressed/adapters.js').WasmFrameDecoder;
  }>;
  export default create;
}
declare module '@cornerstonejs/codec-openjph/wasmjs' {
  const create: (options: object) => Promise<{
    HTJ2KDecoder: new () => import('../../../core/dicom/compressed/adapters.js').WasmFrameDecoder;
  }>;
  export default create;
}
declare module 'jpeg-lossless-decoder-js' {
  export const Decoder: new () => import('../../../core/dicom/compressed/adapters.js').LosslessDecoder;
}
