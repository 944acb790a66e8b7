import {
  closeSync,
  mkdirSync,
  mkdtempSync,
  openSync,
  readSync,
  rmSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import dicomParser from 'dicom-parser';
import { createHeaderCache } from '../../../app/host/library/headerCache.js';
import { createHeaderReader, usualThreads } from '../../../app/host/library/headerReader.js';
import { indexFolder } from '../../../app/host/library/indexFolder.js';
import type { WriteElement } from '../../../core/dicom/write/index.js';
import { ctSlice } from '../../corpus/ctSlice.js';
import { pythonHas, pythonJson } from '../../support/python.js';
import type { Row } from '../row.js';

const SLICES = 1000;

/** Runs before those that are measured: each thread compiles the reader for itself. */
const WARM_UP = 6;

/** Scanners write some two hundred attributes into a header; these stand for those that the bench does not use. */
const FILLING: Readonly<Record<number, WriteElement>> = Object.fromEntries(
  Array.from({ length: 150 }, (_, index) => {
    const tag = 0x00191000 + index;
    return [tag, { tag, vr: 'LO', value: `attribute ${index} of a maker` }] as const;
  }),
);

const PYDICOM = `
import json, os, sys, time, pydicom
folder = sys.argv[1]
names = sorted(os.listdir(folder))
times = []
for _ in range(2):
    start = time.perf_counter()
    for name in names:
        d = pydicom.dcmread(os.path.join(folder, name), stop_before_pixels=True)
        d.ImagePositionPatient, d.SOPInstanceUID
    times.append(time.perf_counter() - start)
print(json.dumps(min(times) * 1000))
`;

/** Index of a folder of 1,000 slices, warm: against pydicom, and against a bare loop of the parser. */
export async function folderIndex(): Promise<readonly Row[]> {
  const folder = mkdtempSync(join(tmpdir(), 'diptych-bench-'));
  try {
    mkdirSync(join(folder, 'series'));
    const stored = new Int16Array(256 * 256);
    const names = Array.from({ length: SLICES }, (_, number) => {
      const bytes = ctSlice({
        rows: 256,
        columns: 256,
        stored,
        number,
        z: number * 0.5,
        change: FILLING,
      });
      const name = join(folder, 'series', `f${String(number).padStart(4, '0')}`);
      writeFileSync(name, bytes);
      return name;
    });
    const reader = createHeaderReader(usualThreads());
    const times: number[] = [];
    const bare: number[] = [];
    for (let run = 0; run < WARM_UP + 5; run++) {
      const start = performance.now();
      const found = await indexFolder(folder, { reader });
      if (run >= WARM_UP) times.push(performance.now() - start);
      if (!found.ok || found.value.stacks[0]?.slices.length !== SLICES) throw new Error('not read');
      const bareStart = performance.now();
      for (const name of names) parseStart(name);
      if (run >= WARM_UP) bare.push(performance.now() - bareStart);
    }
    await reader.close();
    const again = await reopened(folder);
    const middle = (values: number[]): number => values.sort((a, b) => a - b)[2] ?? Number.NaN;
    const measured = middle(times);
    const work = `index of ${SLICES} slices, warm`;
    return [
      {
        work,
        measured,
        unit: 'ms',
        ...(pythonHas('pydicom') && {
          reference: {
            name: 'pydicom headers',
            measured: pythonJson(PYDICOM, [join(folder, 'series')]) as number,
          },
        }),
        fasterThanReference: 5,
      },
      {
        work,
        measured,
        unit: 'ms',
        reference: { name: 'a bare dicom-parser loop over 8 KiB', measured: middle(bare) },
        fasterThanReference: 1 / 1.5,
      },
      {
        work: `index of ${SLICES} slices, unchanged since it was read`,
        measured: middle(again),
        unit: 'ms',
        reference: { name: 'reading them again', measured },
        fasterThanReference: 1,
      },
    ];
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** Times of opening the folder with what is kept of its headers. */
async function reopened(folder: string): Promise<number[]> {
  const cacheFolder = mkdtempSync(join(tmpdir(), 'diptych-bench-cache-'));
  try {
    const report = (error: unknown): void => {
      throw error;
    };
    const cache = createHeaderCache({ folder: cacheFolder, reader: 'bench', report });
    const times: number[] = [];
    for (let run = 0; run < 1 + WARM_UP + 5; run++) {
      const start = performance.now();
      const found = await indexFolder(folder, { cache });
      if (!found.ok || found.value.stacks[0]?.slices.length !== SLICES) throw new Error('not read');
      if (run > WARM_UP) times.push(performance.now() - start);
      await cache.settled();
    }
    return times;
  } finally {
    rmSync(cacheFolder, { recursive: true, force: true });
  }
}

function parseStart(name: string): void {
  const bytes = new Uint8Array(8192);
  const descriptor = openSync(name, 'r');
  readSync(descriptor, bytes, 0, bytes.length, 0);
  closeSync(descriptor);
  dicomParser.parseDicom(bytes, { untilTag: 'x7fe00010' });
}
