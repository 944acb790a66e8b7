import { type CtImage, readHeader, type StoredValues } from '../../../../core/dicom/index.js';
import type { ReadSlice, Sharpness } from '../../../../core/pairing/index.js';
import { buildStacks, type Stack } from '../../../../core/stack/index.js';
import { CORPUS_ROOT, ctSlice } from '../../../corpus/ctSlice.js';

/** What a stack of the fixture differs in from the others. */
export interface StackOptions {
  readonly series: number;
  readonly slices?: number;
  readonly fromMm?: number;
  readonly spacingMm?: number;
  readonly matrix?: number;
  readonly identity?: Partial<CtImage['identity']>;
  readonly acquisition?: Partial<CtImage['acquisition']>;
  /** Changes of single slices. */
  readonly slice?: (index: number) => Partial<CtImage['acquisition']>;
}

/** A stack of headers: 0.4 mm pixels around (0, 0), one acquisition, phase 75 %. */
export function stackOf(options: StackOptions): Stack {
  const { series, slices = 12, fromMm = 0, spacingMm = 0.5, matrix = 256 } = options;
  const bytes = ctSlice();
  const reading = readHeader(bytes, bytes.length);
  if (reading.kind !== 'image') throw new Error(reading.kind);
  const [image] = reading.images;
  const uid = `${CORPUS_ROOT}.7.${series}`;
  const corner = -((matrix - 1) / 2) * 0.4;
  const files = Array.from({ length: slices }, (_, index) => ({
    fileId: series * 10_000 + index,
    file: `${series}/${index}`,
    image: {
      ...image,
      sopInstanceUid: `${uid}.${index}`,
      instanceNumber: index + 1,
      identity: { ...image.identity, ...options.identity },
      acquisition: {
        ...image.acquisition,
        seriesInstanceUid: uid,
        seriesNumber: series,
        acquisitionNumber: 2,
        phasePercent: 75,
        kvp: 100,
        ...options.acquisition,
        ...options.slice?.(index),
      },
      grid: {
        ...image.grid,
        positionMm: [corner, corner, fromMm + index * spacingMm] as const,
        pixelSpacingMm: [0.4, 0.4] as const,
        rows: matrix,
        columns: matrix,
      },
      pixels: { ...image.pixels, rescale: { slope: 1, intercept: -1024 }, unit: 'HU' },
    },
  }));
  const [stack, ...others] = buildStacks(files).stacks;
  if (stack === undefined || others.length > 0) throw new Error('not one stack');
  return stack;
}

/** Discs of 100 to 400 HU in fat, drawn with a ramp at their edges; a place is a place in the patient, whatever the grid. */
export function discs(stack: Stack, sliceIndex: number, shiftMm = 0): StoredValues {
  const slice = stack.slices[sliceIndex];
  if (slice === undefined) throw new RangeError(`no slice: ${sliceIndex}`);
  const { grid } = slice.image;
  const stored = new Int16Array(grid.rows * grid.columns);
  const centres = [-36, -12, 12, 36];
  for (let row = 0; row < grid.rows; row += 1) {
    const y = grid.positionMm[1] + row * grid.pixelSpacingMm[0];
    for (let column = 0; column < grid.columns; column += 1) {
      const x = grid.positionMm[0] + column * grid.pixelSpacingMm[1] - shiftMm;
      let hu = -100;
      for (const [i, cx] of centres.entries()) {
        for (const [j, cy] of centres.entries()) {
          const distance = Math.hypot(x - cx - j, y - cy + 2 * i) - (4 + ((i + 2 * j) % 4));
          hu += (200 + 100 * ((i + j) % 4)) / (1 + Math.exp(Math.min(50, distance / 0.5)));
        }
      }
      stored[row * grid.columns + column] = Math.round(hu + 1024);
    }
  }
  return stored;
}

/** A reader of {@link discs} that counts what it reads; each grid is drawn once. */
export function countingReader(): { read: ReadSlice; count: () => number; most: () => number } {
  const drawn = new Map<string, StoredValues>();
  const reads = new Map<Stack, number>();
  return {
    async read(stack, sliceIndex) {
      reads.set(stack, (reads.get(stack) ?? 0) + 1);
      const { grid } = stack.slices[0].image;
      const key = [...grid.positionMm.slice(0, 2), grid.rows].join(' ');
      const stored = drawn.get(key) ?? discs(stack, sliceIndex);
      drawn.set(key, stored);
      return stored;
    },
    count: () => [...reads.values()].reduce((sum, value) => sum + value, 0),
    most: () => Math.max(0, ...reads.values()),
  };
}

/** A measure of sharpness that calls a series sharp by its number: odd is soft, even sharp; equal parity is one kernel. */
export async function byParity(first: Stack, second: Stack): Promise<Sharpness> {
  const [a, b] = [first, second].map(
    ({ slices }) => (slices[0].image.acquisition.seriesNumber ?? 0) % 2 === 0,
  );
  return {
    decided: a !== b,
    ...(a !== b && { sharper: a ? 'first' : 'second' }),
    confidence: a === b ? 0.5 : 0.98,
    noiseSoftHu: 10,
    noiseSharpHu: a === b ? 10 : 30,
    frequencySoft: 0.25,
    frequencySharp: a === b ? 0.25 : 0.5,
    edgeSoftMm: null,
    edgeSharpMm: null,
    text: a === b ? 'same kernel' : a ? 'the first is sharper' : 'the second is sharper',
  };
}
