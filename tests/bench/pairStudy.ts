import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { ctSlice } from '../corpus/ctSlice.js';

/** Stored bytes of a pair of {@link writePairStudy}. */
export function pairBytes(slices: number, matrix: number): number {
  return 2 * slices * matrix * matrix * 2;
}

/**
 * Writes two synthetic series of one acquisition into a folder. One slice is made, and its bytes are written
 * again with another instance UID and position: only reading them is measured.
 */
export function writePairStudy(folder: string, slices: number, matrix: number): void {
  mkdirSync(folder, { recursive: true });
  const stored = Int16Array.from({ length: matrix * matrix }, (_, i) => 1300 + ((i * 31) % 400));
  const place = 10_000.25;
  const first = 10_000_000;
  for (const [series, number] of [
    ['2.25.8.1', 3],
    ['2.25.8.2', 4],
  ] as const) {
    const bytes = Buffer.from(
      ctSlice({
        rows: matrix,
        columns: matrix,
        stored,
        series,
        number: first,
        z: place,
        change: { 2097169: { tag: 0x00200011, vr: 'IS', value: number } },
      }),
    );
    const uid = `${series}.${first}`;
    const metaAt = bytes.indexOf(uid) + series.length + 1;
    const uidAt = bytes.indexOf(uid, metaAt) + series.length + 1;
    const placeAt = bytes.indexOf(String(place));
    for (let slice = 0; slice < slices; slice++) {
      bytes.write(String(first + slice), metaAt, 'latin1');
      bytes.write(String(first + slice), uidAt, 'latin1');
      bytes.write((place + slice * 0.5).toFixed(2), placeAt, 'latin1');
      writeFileSync(join(folder, `${number}-${String(slice).padStart(4, '0')}`), bytes);
    }
  }
}
