import { deflate } from 'pako';
import type { Raster } from './raster.js';

const SIGNATURE = [0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a];
/** Colour type 2 of the standard: red, green, blue. */
const TRUE_COLOUR = 2;

/**
 * A picture as a PNG file (PNG specification, third edition, W3C 2025; ISO/IEC 15948): 8 bit a colour, no
 * interlacing, each row filtered by the difference to the pixel before it. The same picture always gives the same
 * bytes: there is no time in the file.
 */
export function encodePng({ width, height, rgb }: Raster): Uint8Array {
  const header = new Uint8Array(13);
  const view = new DataView(header.buffer);
  view.setUint32(0, width);
  view.setUint32(4, height);
  header.set([8, TRUE_COLOUR, 0, 0, 0], 8);
  const parts = [
    Uint8Array.from(SIGNATURE),
    chunk('IHDR', header),
    chunk('IDAT', deflate(filtered(rgb, width * 3, height), { level: 6 })),
    chunk('IEND', new Uint8Array(0)),
  ];
  const file = new Uint8Array(parts.reduce((sum, part) => sum + part.length, 0));
  let at = 0;
  for (const part of parts) {
    file.set(part, at);
    at += part.length;
  }
  return file;
}

/** Rows with the filter "Sub" in front: each byte less the one of the pixel before it. */
function filtered(rgb: Uint8ClampedArray, rowBytes: number, rows: number): Uint8Array {
  const bytes = new Uint8Array((rowBytes + 1) * rows);
  for (let row = 0; row < rows; row += 1) {
    const from = row * rowBytes;
    const to = row * (rowBytes + 1);
    bytes[to] = 1;
    for (let index = 0; index < rowBytes; index += 1) {
      const before = index < 3 ? 0 : (rgb[from + index - 3] as number);
      bytes[to + 1 + index] = (rgb[from + index] as number) - before;
    }
  }
  return bytes;
}

function chunk(type: string, data: Uint8Array): Uint8Array {
  const bytes = new Uint8Array(12 + data.length);
  const view = new DataView(bytes.buffer);
  view.setUint32(0, data.length);
  bytes.set(
    [...type].map((letter) => letter.charCodeAt(0)),
    4,
  );
  bytes.set(data, 8);
  view.setUint32(8 + data.length, crc32(bytes.subarray(4, 8 + data.length)));
  return bytes;
}

const TABLE = Uint32Array.from({ length: 256 }, (_, byte) => {
  let value = byte;
  for (let bit = 0; bit < 8; bit += 1) value = value & 1 ? 0xedb88320 ^ (value >>> 1) : value >>> 1;
  return value;
});

/** The check of annex D of the standard. */
function crc32(bytes: Uint8Array): number {
  let crc = 0xffffffff;
  for (const byte of bytes) crc = (TABLE[(crc ^ byte) & 255] as number) ^ (crc >>> 8);
  return (crc ^ 0xffffffff) >>> 0;
}
