import { decodeImage, type StoredValues } from '../../../../core/dicom/index.js';
import {
  anySynthetic,
  createNote,
  type Note,
  noteConditions,
  notePair,
  noteStudy,
} from '../../../../core/note/index.js';
import { headerEvidence } from '../../../../core/pairing/index.js';
import { measureRegion, type Shape } from '../../../../core/region/index.js';
import { buildStacks, type IndexedImage, type Stack } from '../../../../core/stack/index.js';
import { CORPUS_ROOT, type CtSliceOptions, ctSlice } from '../../../corpus/ctSlice.js';

export const NOW = '2026-01-05T09:30:00.000Z';
export const LATER = '2026-01-05T09:31:00.000Z';
export const SOFT_SERIES = `${CORPUS_ROOT}.2.1`;
export const SHARP_SERIES = `${CORPUS_ROOT}.2.2`;

const ROWS = 20;
const COLUMNS = 30;
const SLICES = 4;

/** Stored values of the fixture: soft is 1024 + 100 + column; sharp alternates by 20 about that. */
function stored(sharp: boolean): Int16Array {
  return Int16Array.from({ length: ROWS * COLUMNS }, (_, index) => {
    const column = index % COLUMNS;
    const row = (index - column) / COLUMNS;
    return 1124 + column + (sharp ? ((row + column) % 2 === 0 ? 20 : -20) : 0);
  });
}

/** Bytes of every file of a small synthetic pair: soft first, z from 0 to 3 mm, 0.5 mm × 0.25 mm pixels from (−10, −20). */
export function pairFiles(change: CtSliceOptions['change'] = {}): readonly Uint8Array[] {
  return [SOFT_SERIES, SHARP_SERIES].flatMap((series, sharp) =>
    Array.from({ length: SLICES }, (_, z) =>
      ctSlice({
        rows: ROWS,
        columns: COLUMNS,
        series,
        z,
        number: z + 1,
        stored: stored(sharp === 1),
        change: {
          1577488: { tag: 0x00181210, vr: 'SH', value: sharp === 1 ? 'Crisp' : 'Plain' },
          1572960: { tag: 0x00180060, vr: 'DS', value: 120 },
          ...change,
        },
      }),
    ),
  );
}

export interface Pair {
  readonly soft: Stack;
  readonly sharp: Stack;
  readonly storedOf: (stack: Stack, sliceIndex: number) => StoredValues | undefined;
}

/** The pair read from its bytes, as the program reads any. */
export async function pair(files: readonly Uint8Array[] = pairFiles()): Promise<Pair> {
  const decoded = await Promise.all(
    files.map(async (bytes) => {
      const image = await decodeImage(bytes);
      if (!image.ok) throw new Error(image.refusal.text);
      return image.value;
    }),
  );
  const images = decoded.map(
    ({ image }, fileId): IndexedImage => ({ fileId, file: `f${fileId}`, image }),
  );
  const { stacks } = buildStacks(images);
  const of = (series: string) => {
    const stack = stacks.find(
      ({ slices }) => slices[0].image.acquisition.seriesInstanceUid === series,
    );
    if (stack === undefined) throw new Error(`no stack: ${series}`);
    return stack;
  };
  return {
    soft: of(SOFT_SERIES),
    sharp: of(SHARP_SERIES),
    storedOf: (stack, index) => decoded[stack.slices[index]?.fileId ?? -1]?.stored,
  };
}

/** A new note over a pair. */
export function emptyNote({ soft, sharp }: Pick<Pair, 'soft' | 'sharp'>): Note {
  return createNote({
    id: 'n-1',
    now: NOW,
    reader: 'Reader One',
    software: { name: 'Diptych', version: '0.1.0' },
    study: noteStudy(soft),
    pair: notePair(soft, sharp, headerEvidence(soft, sharp)),
    conditions: noteConditions(soft, sharp),
    synthetic: anySynthetic(soft, sharp),
  });
}

/** An ellipse on slice 1 about a column and row of the fixture's grid. */
export function ellipse(
  column: number,
  row: number,
  radiiMm: readonly [number, number] = [0.6, 1.1],
): Shape {
  return { kind: 'ellipse', centreMm: [-10 + 0.25 * column, -20 + 0.5 * row, 1], radiiMm };
}

/** What a shape measures on both stacks of the pair. */
export function values({ soft, sharp, storedOf }: Pair, shape: Shape) {
  return {
    soft: measureRegion(shape, soft, (index) => storedOf(soft, index)),
    sharp: measureRegion(shape, sharp, (index) => storedOf(sharp, index)),
  };
}
