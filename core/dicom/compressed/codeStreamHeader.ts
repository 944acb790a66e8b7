/** What the head of a code stream says of its samples, where it says it. */
export interface CodeStreamHeader {
  readonly bitsPerSample: number;
  /** JPEG 2000 carries a sign; the JPEG family does not. */
  readonly signed?: boolean;
  readonly width: number;
  readonly height: number;
  readonly components: number;
  /** True when the coding itself loses information: the 9-7 wavelet, a near-lossless bound above 0, a DCT. */
  readonly lossy: boolean;
  /** Low bits that JPEG lossless dropped before coding (ITU-T T.81 H.1.2.1); 0 for most. */
  readonly pointTransform?: number;
}

const SOF_MARKERS = new Set([0xc0, 0xc1, 0xc2, 0xc3, 0xf7]);
const SOF_LOSSLESS = 0xc3;
const SOF_JPEG_LS = 0xf7;

/**
 * Reads the head of a JPEG (ITU-T T.81 B.2.2), JPEG-LS (T.87 C.2.2) or JPEG 2000 / HTJ2K (T.800 A.5, A.6) code
 * stream. A JP2 box wrapper (T.800 Annex I) around it is stepped over.
 *
 * @returns undefined when the bytes hold no such head, or not all of it
 */
export function readCodeStreamHeader(bytes: Uint8Array): CodeStreamHeader | undefined {
  const stream = codeStreamOf(bytes);
  if (stream[0] !== 0xff) return undefined;
  if (stream[1] === 0x4f) return readJpeg2000(stream);
  if (stream[1] === 0xd8) return readJpeg(stream);
  return undefined;
}

/** The code stream itself: bytes from the SOC mark on where they are wrapped in JP2 boxes, else all of them. */
export function codeStreamOf(bytes: Uint8Array): Uint8Array {
  const isJp2 = bytes[4] === 0x6a && bytes[5] === 0x50 && bytes[6] === 0x20 && bytes[7] === 0x20;
  if (!isJp2) return bytes;
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  let at = 0;
  while (at + 8 <= bytes.length) {
    const length = view.getUint32(at);
    if (view.getUint32(at + 4) === 0x6a703263) return bytes.subarray(at + 8);
    if (length < 8) break;
    at += length;
  }
  return bytes;
}

function readJpeg2000(bytes: Uint8Array): CodeStreamHeader | undefined {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  if (bytes.length < 43 || view.getUint16(2) !== 0xff51) return undefined;
  const precision = view.getUint8(42);
  const wavelet = readWavelet(view);
  if (wavelet === undefined) return undefined;
  return {
    width: view.getUint32(8) - view.getUint32(16),
    height: view.getUint32(12) - view.getUint32(20),
    components: view.getUint16(40),
    bitsPerSample: (precision & 0x7f) + 1,
    signed: (precision & 0x80) !== 0,
    lossy: wavelet === 0,
  };
}

/** Transformation of the COD mark: 0 is the irreversible 9-7, 1 the reversible 5-3 wavelet (T.800 table A.20). */
function readWavelet(view: DataView): number | undefined {
  let at = 2;
  while (at + 4 <= view.byteLength) {
    const marker = view.getUint16(at);
    if (marker === 0xff52) return at + 13 < view.byteLength ? view.getUint8(at + 13) : undefined;
    if (marker === 0xff90) return undefined;
    at += 2 + view.getUint16(at + 2);
  }
  return undefined;
}

function readJpeg(bytes: Uint8Array): CodeStreamHeader | undefined {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  let frame: Omit<CodeStreamHeader, 'lossy'> | undefined;
  let kind = 0;
  let at = 2;
  while (at + 4 <= bytes.length && view.getUint8(at) === 0xff) {
    const marker = view.getUint8(at + 1);
    const length = view.getUint16(at + 2);
    if (at + 2 + length > bytes.length) return undefined;
    if (SOF_MARKERS.has(marker) && length >= 8) {
      kind = marker;
      frame = {
        bitsPerSample: view.getUint8(at + 4),
        height: view.getUint16(at + 5),
        width: view.getUint16(at + 7),
        components: view.getUint8(at + 9),
      };
    }
    if (marker === 0xda) {
      if (frame === undefined) return undefined;
      // NEAR stands behind the component selectors of a JPEG-LS scan.
      const selectors = view.getUint8(at + 4);
      const low = kind === SOF_LOSSLESS ? view.getUint8(at + 7 + 2 * selectors) & 0x0f : 0;
      const near = kind === SOF_JPEG_LS ? view.getUint8(at + 5 + 2 * selectors) : 0;
      return {
        ...frame,
        lossy: kind === SOF_JPEG_LS ? near > 0 : kind !== SOF_LOSSLESS || low > 0,
        ...(low > 0 && { pointTransform: low }),
      };
    }
    at += 2 + length;
  }
  return undefined;
}
