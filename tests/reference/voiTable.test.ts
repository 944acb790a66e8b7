import { execFileSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { readHeader } from '../../core/dicom/index.js';
import type { WriteElement } from '../../core/dicom/write/index.js';
import { displayTable } from '../../core/intensity/index.js';
import { ctSlice } from '../corpus/ctSlice.js';
import { change } from '../corpus/element.js';

const PYTHON = '/usr/bin/python3';
const DCMTK = '/usr/bin/dcm2pnm';
const hasPydicom =
  existsSync(PYTHON) &&
  (() => {
    try {
      execFileSync(PYTHON, ['-c', 'import pydicom, numpy'], { stdio: 'ignore' });
      return true;
    } catch {
      return false;
    }
  })();

const COLUMNS = 64;
const ROWS = 32;
/** HU from −1024 to 1023, each once: before, in and after the tables. */
const STORED = Int16Array.from({ length: COLUMNS * ROWS }, (_, index) => index);

/** A table of n entries that bends, as tables of scanners do. */
const bent = (entries: number, most: number): readonly number[] =>
  Array.from({ length: entries }, (_, i) => Math.round(most * (i / (entries - 1)) ** 0.6));

/** First input −200 in two's complement. */
const FIRST = 0x10000 - 200;

const table = (bits: number, values: readonly number[], vr: 'US' | 'SS' = 'US'): WriteElement => ({
  tag: 0x00283010,
  vr: 'SQ',
  items: [
    [
      {
        tag: 0x00283002,
        vr,
        value: [values.length, vr === 'SS' ? -200 : FIRST, bits],
      },
      { tag: 0x00283006, vr: 'US', value: values },
    ],
  ],
});

function greysOf(bytes: Uint8Array): readonly number[] {
  const reading = readHeader(bytes, bytes.length);
  if (reading.kind !== 'image') throw new Error(`no image: ${reading.kind}`);
  const [image] = reading.images;
  const [window] = image.windows;
  if (window === undefined) throw new Error('the table is no window');
  const levels = displayTable(image.pixels, window);
  return Array.from(STORED, (stored) => levels[stored & 0xffff] ?? -1);
}

function inFolder<T>(bytes: Uint8Array, work: (path: string) => T): T {
  const folder = mkdtempSync(join(tmpdir(), 'diptych-voi-'));
  try {
    const path = join(folder, 'a.dcm');
    writeFileSync(path, bytes);
    return work(path);
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

const CASES: readonly (readonly [string, WriteElement])[] = [
  ['8 bits', table(8, bent(600, 255), 'SS')],
  ['12 bits', table(12, bent(600, 4095), 'SS')],
  ['16 bits', table(16, bent(600, 65535), 'SS')],
];

describe.each(CASES)('a VOI LUT of %s (PS3.3 C.11.2.1.1)', (name, element) => {
  const bytes = ctSlice({ rows: ROWS, columns: COLUMNS, stored: STORED, change: change(element) });

  // pydicom 2.3 counts the entries of an 8-bit table in 8 bits, so that more than 256 of them wrap: not compared.
  test.skipIf(!hasPydicom || name === '8 bits')(
    'gives the greys of pydicom, apply_voi_lut over apply_modality_lut',
    () => {
      const script = [
        'import sys, json, numpy as np, pydicom',
        'from pydicom.pixel_data_handlers.util import apply_modality_lut, apply_voi_lut',
        'd = pydicom.dcmread(sys.argv[1])',
        'hu = apply_modality_lut(d.pixel_array, d).astype(np.int32)',
        'bits = d.VOILUTSequence[0].LUTDescriptor[2]',
        'out = apply_voi_lut(hu, d).astype(np.float64) / (2 ** bits - 1) * 255',
        'print(json.dumps(np.floor(out + 0.5).astype(int).ravel().tolist()))',
      ].join('\n');
      const expected = inFolder(bytes, (path) =>
        JSON.parse(execFileSync(PYTHON, ['-c', script, path], { encoding: 'utf8' })),
      );
      expect(greysOf(bytes)).toEqual(expected);
    },
  );

  test.skipIf(!existsSync(DCMTK))('gives the greys of dcmtk, dcm2pnm +Wl 1, within a level', () => {
    const pgm = inFolder(bytes, (path) => {
      const out = `${path}.pgm`;
      execFileSync(DCMTK, ['+Wl', '1', '+op', path, out], { stdio: 'ignore' });
      return readFileSync(out);
    });
    // The last bytes of a binary PGM are its pixels.
    const expected = pgm.subarray(pgm.length - STORED.length);
    const greys = greysOf(bytes);
    const off = greys.map((grey, index) => Math.abs(grey - (expected[index] ?? -99)));
    // dcmtk cuts where we round.
    expect(Math.max(...off)).toBeLessThanOrEqual(1);
    expect(new Set(greys).size).toBeGreaterThan(200);
  });
});

test('the first input is signed in HU though its VR is US, as the standard has it', () => {
  const make = (vr: 'US' | 'SS'): readonly number[] => {
    const element = table(16, bent(600, 65535), vr);
    return greysOf(
      ctSlice({ rows: ROWS, columns: COLUMNS, stored: STORED, change: change(element) }),
    );
  };
  expect(make('US')).toEqual(make('SS'));
});
