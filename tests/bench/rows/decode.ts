import { execFileSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Worker } from 'node:worker_threads';
import { ctSlice } from '../../corpus/ctSlice.js';
import type { Row } from '../row.js';

const MATRIX = 512;

/** Encoders and the decoders of the same file, both general-purpose command lines of dcmtk and gdcm. */
const SYNTAXES: readonly {
  readonly name: string;
  readonly encode: readonly [string, ...string[]];
  readonly decode: readonly [string, ...string[]];
}[] = [
  { name: 'explicit little endian', encode: ['dcmconv', '+te'], decode: ['dcmconv', '+ti'] },
  { name: 'RLE', encode: ['dcmcrle'], decode: ['dcmdrle'] },
  { name: 'JPEG lossless', encode: ['dcmcjpeg', '+e1'], decode: ['dcmdjpeg'] },
  { name: 'JPEG-LS lossless', encode: ['dcmcjpls', '+el'], decode: ['dcmdjpls'] },
  { name: 'JPEG 2000 lossless', encode: ['gdcmconv', '--j2k'], decode: ['gdcmconv', '-w'] },
];

/**
 * Decoding of one 512² slice by transfer syntax, MB of stored pixels a second, in one worker thread that is warm.
 * The reference is the whole process of a command line that decodes the same file: its start and its writing of
 * the result are in it, so the ratio flatters us, and no ratio is demanded. It shows a decoder that stalls.
 */
export async function decode(): Promise<readonly Row[]> {
  const folder = mkdtempSync(join(tmpdir(), 'diptych-decode-'));
  try {
    const plain = join(folder, 'plain.dcm');
    writeFileSync(plain, ctSlice({ rows: MATRIX, columns: MATRIX, stored: tissue() }));
    const rows: Row[] = [];
    for (const { name, encode, decode: tool } of SYNTAXES) {
      if (!existsSync(`/usr/bin/${encode[0]}`) || !existsSync(`/usr/bin/${tool[0]}`)) continue;
      const file = join(folder, `${name}.dcm`);
      run(encode, plain, file);
      const seconds = await secondsInWorker(file);
      const reference = secondsOf(() => run(tool, file, join(folder, 'decoded.dcm')));
      const megabytes = (MATRIX * MATRIX * 2) / 1e6;
      rows.push({
        work: `decode of ${MATRIX}² ${name}, ${(megabytes / seconds).toFixed(0)} MB/s a thread`,
        measured: seconds * 1000,
        unit: 'ms',
        reference: { name: `the whole process of ${tool[0]}`, measured: reference * 1000 },
      });
    }
    return rows;
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** Smooth shapes with noise on them: pixels that compress about as those of a scanner do. */
function tissue(): Int16Array {
  let seed = 12345;
  const noise = (): number => {
    seed = (Math.imul(seed, 1664525) + 1013904223) | 0;
    return ((seed >>> 16) % 61) - 30;
  };
  return Int16Array.from({ length: MATRIX * MATRIX }, (_, i) => {
    const x = (i % MATRIX) - MATRIX / 2;
    const y = Math.floor(i / MATRIX) - MATRIX / 2;
    const inside = x * x + y * y < 200 ** 2;
    return (inside ? 1070 + Math.round(200 * Math.sin(x / 40) * Math.cos(y / 30)) : 24) + noise();
  });
}

function run([tool, ...flags]: readonly [string, ...string[]], from: string, to: string): void {
  execFileSync(`/usr/bin/${tool}`, [...flags, from, to], { stdio: 'ignore' });
}

function secondsOf(work: () => void): number {
  const times = Array.from({ length: 5 }, () => {
    const start = performance.now();
    work();
    return (performance.now() - start) / 1000;
  });
  return times.sort((a, b) => a - b)[2] ?? Number.NaN;
}

/** The median time that the built decoding worker of these benchmarks takes for a file's bytes. */
async function secondsInWorker(file: string): Promise<number> {
  const worker = new Worker(new URL('./decodeBench.worker.js', import.meta.url), {
    workerData: new Uint8Array(readFileSync(file)),
  });
  try {
    return await new Promise<number>((resolve, reject) => {
      worker.once('message', resolve).once('error', reject);
    });
  } finally {
    await worker.terminate();
  }
}
