import { describe, expect, it } from 'vitest';
import type { KernelTexture } from '../../../../core/quality/index.js';
import { FLAGS, type NoiseOfStack } from '../../../../core/region/index.js';
import type { DecodeRequest } from '../../../../renderer/volumes/decodeRequest.js';
import { nextTask } from '../../../../renderer/volumes/loadOrder.js';
import { loadPair } from '../../../../renderer/volumes/loadPair.js';
import { createMeasureShape } from '../../../../renderer/volumes/measureShape.js';
import { createVolume, type Volume } from '../../../../renderer/volumes/volume.js';
import { poolSize } from '../../../../renderer/volumes/workerPool.js';
import { sampleStack } from '../sample.js';

function volumeOf(series: string): Volume {
  const volume = createVolume(sampleStack({ series, rows: 2, columns: 2 }));
  if (!volume.ok) throw new Error(volume.refusal.text);
  return volume.value;
}

/** A stand-in for the workers: each value of a slice is its file's number; file 3 can't be read. */
function standInPool(asked: string[], size = 1) {
  return {
    size,
    decode: async ({ image: { sopInstanceUid }, frame }: DecodeRequest) => {
      asked.push(sopInstanceUid);
      const fileId = Number(frame.url);
      if (fileId === 3) return { ok: false, text: 'The file ends too early.' } as const;
      return {
        ok: true,
        values: Int16Array.from([fileId, fileId, fileId, -fileId]).buffer,
      } as const;
    },
  };
}

const frame = (fileId: number) => ({ url: String(fileId), headers: {} });

describe('The order of reading', () => {
  it('reads the shown slices of both stacks first, and then outwards', () => {
    const asked: string[] = [];
    const waiting = { soft: new Set([0, 1, 2, 3, 4]), sharp: new Set([0, 1, 2, 3, 4]) };
    for (;;) {
      const task = nextTask(
        { soft: { indices: waiting.soft, shown: 2 }, sharp: { indices: waiting.sharp, shown: 2 } },
        { soft: 0, sharp: 0 },
      );
      if (task === undefined) break;
      waiting[task.kernel].delete(task.index);
      asked.push(`${task.kernel} ${task.index}`);
    }
    expect(asked.slice(0, 6)).toEqual([
      'soft 2',
      'sharp 2',
      'soft 1',
      'soft 3',
      'sharp 1',
      'sharp 3',
    ]);
    expect(asked).toHaveLength(10);
  });

  it('gives a second worker the other stack’s slice', () => {
    const indices = new Set([1, 2]);
    const task = nextTask(
      { soft: { indices: new Set([1]), shown: 2 }, sharp: { indices, shown: 1 } },
      { soft: 1, sharp: 0 },
    );
    expect(task).toEqual({ kernel: 'sharp', index: 1 });
  });
});

describe('Reading a pair', () => {
  it('puts every slice into its volume, and makes a gap with its sentence of one that can’t be read', async () => {
    const volumes = { soft: volumeOf('2.25.1'), sharp: volumeOf('2.25.2') };
    const gaps: string[] = [];
    const read: string[] = [];
    await loadPair({
      volumes,
      pool: standInPool([], 2),
      frame,
      shown: () => 0,
      onSlice: (kernel, index) => read.push(`${kernel} ${index}`),
      onGap: (kernel, index, text) => gaps.push(`${kernel} ${index}: ${text}`),
      signal: new AbortController().signal,
    }).done;
    expect(read).toHaveLength(8);
    expect(gaps.sort()).toEqual([
      'sharp 3: The file ends too early.',
      'soft 3: The file ends too early.',
    ]);
    expect(volumes.soft.slice(3)).toBeUndefined();
    expect([...(volumes.sharp.slice(4) ?? [])]).toEqual([4, 4, 4, -4]);
    expect(volumes.soft.slice(1)).toBe(volumes.soft.slice(1));
  });

  it('begins with what is shown at that moment, also when the reader has scrolled on', async () => {
    const asked: string[] = [];
    let shown = 4;
    await loadPair({
      volumes: { soft: volumeOf('2.25.1'), sharp: undefined },
      pool: standInPool(asked),
      frame,
      shown: () => shown,
      onSlice: () => {
        shown = 0;
      },
      onGap: () => {},
      signal: new AbortController().signal,
    }).done;
    expect(asked).toEqual(['2.25.1.5', '2.25.1.1', '2.25.1.2', '2.25.1.3', '2.25.1.4']);
  });

  it('reads nothing more once it is given up', async () => {
    const asked: string[] = [];
    const abort = new AbortController();
    await loadPair({
      volumes: { soft: volumeOf('2.25.1'), sharp: volumeOf('2.25.2') },
      pool: standInPool(asked),
      frame,
      shown: () => 0,
      onSlice: () => abort.abort(),
      onGap: () => {},
      signal: abort.signal,
    }).done;
    expect(asked).toHaveLength(1);
  });
});

describe('The pool of workers', () => {
  it('leaves a core to the page and has four workers at most, one at least', () => {
    expect([1, 2, 4, 16].map(poolSize)).toEqual([1, 1, 3, 4]);
  });
});

describe('Measuring a shape', () => {
  const shape = {
    kind: 'outline',
    pointsMm: [
      [-11, -21, 1],
      [-9, -21, 1],
      [-9, -19, 1],
      [-11, -19, 1],
    ],
  } as const;
  const receive = (volume: Volume, index: number, value: number): void => {
    volume.receive(index, Int16Array.from({ length: 4 }, () => value).buffer);
  };

  it('has no value on a stack whose slice is still to come, and one when it has come', () => {
    const soft = volumeOf('2.25.1');
    const sharp = volumeOf('2.25.2');
    const measure = createMeasureShape(() => false);
    receive(soft, 1, 100);
    expect(measure(shape, { soft, sharp })).toMatchObject({
      soft: { n: 4, meanHu: 100, sliceIndex: 1 },
      sharp: null,
    });
    receive(sharp, 1, 300);
    expect(measure(shape, { soft, sharp }).sharp).toMatchObject({ n: 4, meanHu: 300 });
  });

  it('gives the same value without measuring again', () => {
    const soft = volumeOf('2.25.1');
    receive(soft, 1, 100);
    const measure = createMeasureShape(() => false);
    const pair = { soft, sharp: undefined };
    expect(measure(shape, pair).soft).toBe(measure(shape, pair).soft);
  });

  it('measures again when the noise of the stack has become known', () => {
    const soft = volumeOf('2.25.1');
    receive(soft, 1, 100);
    const white: KernelTexture = {
      noiseSdHu: 10,
      areas: 8,
      frequencyPerMm: [0.02, 2],
      powerHu2Mm2: [100, 100],
      meanPerMm: 0.5,
      peakPerMm: 0.5,
      riseMm: null,
      blurFwhmMm: null,
    };
    let noise: NoiseOfStack = FLAGS.noStandardErrorYet;
    const measure = createMeasureShape(
      () => false,
      () => noise,
    );
    const pair = { soft, sharp: undefined };
    expect(measure(shape, pair).soft).toMatchObject({
      standardErrorHu: null,
      flags: expect.arrayContaining([FLAGS.noStandardErrorYet]),
    });
    noise = white;
    const value = measure(shape, pair).soft;
    expect(value?.standardErrorHu).toBeGreaterThan(0);
    expect(measure(shape, pair).soft).toBe(value);
  });

  it('says why there is none on a slice that can’t be read', () => {
    const measure = createMeasureShape(() => true);
    const { soft, sharp } = measure(shape, { soft: volumeOf('2.25.1'), sharp: undefined });
    expect(soft?.meanHu).toBeNull();
    expect(soft?.flags).not.toEqual([]);
    expect(sharp).toBeNull();
  });
});
