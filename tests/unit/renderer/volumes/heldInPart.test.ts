import { describe, expect, it } from 'vitest';
import type { Kernel } from '../../../../core/note/index.js';
import { FLAGS, type NoiseOfStack } from '../../../../core/region/index.js';
import type { DecodeRequest } from '../../../../renderer/volumes/decodeRequest.js';
import { windowAround } from '../../../../renderer/volumes/loadOrder.js';
import { loadPair, type PairLoading } from '../../../../renderer/volumes/loadPair.js';
import { createMeasureShape } from '../../../../renderer/volumes/measureShape.js';
import { memoryBudgets } from '../../../../renderer/volumes/memoryBudget.js';
import {
  createVolume,
  isWhole,
  type Volume,
  type VolumeOptions,
} from '../../../../renderer/volumes/volume.js';
import { axial, sampleStack } from '../sample.js';

/** Twenty slices of 2 × 2 pixels of 16 bit: 8 bytes each. */
const STACK = sampleStack({ rows: 2, columns: 2, positionsMm: axial(20, 1) });
const SLICE_BYTES = 8;

function volumeOf(options: VolumeOptions, stack = STACK): Volume {
  const volume = createVolume(stack, options);
  if (!volume.ok) throw new Error(volume.refusal.text);
  return volume.value;
}

/** A stand-in for the workers: every value of a slice is its number. */
function standInPool(read: number[]) {
  return {
    size: 2,
    decode: async ({ frame }: DecodeRequest) => {
      const number = Number(frame.url);
      read.push(number);
      const values = Int16Array.from({ length: 4 }, () => number).buffer;
      return { ok: true, values } as const;
    },
  };
}

/** Lets everything that can be read now be read. */
const settled = (): Promise<void> => new Promise((done) => setTimeout(done, 5));

function reading(options: { readonly shown: number; readonly capacity: number }) {
  const read: number[] = [];
  const abort = new AbortController();
  const at = { shown: options.shown };
  const onSlice: { now: (kernel: Kernel, index: number, passing: boolean) => void } = {
    now: () => {},
  };
  let loading: PairLoading | undefined;
  const soft = volumeOf({
    budgetBytes: options.capacity * SLICE_BYTES,
    onAsk: (index) => loading?.ask('soft', index),
  });
  const started = loadPair({
    volumes: { soft, sharp: undefined },
    pool: standInPool(read),
    frame: (fileId) => ({ url: String(fileId), headers: {} }),
    shown: () => at.shown,
    onSlice: (...slice) => onSlice.now(...slice),
    onGap: () => {},
    signal: abort.signal,
  });
  loading = started;
  return { soft, read, at, onSlice, abort, loading: started };
}

const heldOf = (volume: Volume): number[] => [...volume.held()].sort((a, b) => a - b);

describe('A volume', () => {
  it('holds its whole stack where there is room', () => {
    expect(isWhole(volumeOf({ budgetBytes: 20 * SLICE_BYTES }))).toBe(true);
    expect(volumeOf({ budgetBytes: 20 * SLICE_BYTES - 1 }).capacity).toBe(19);
  });

  it('is one buffer that workers write to where the page may share memory', () => {
    const volume = volumeOf({ isolated: true });
    const target = volume.target(3);
    if (target === undefined) throw new Error('not shared');
    expect(target.offsetBytes).toBe(24);
    expect(target.buffer.byteLength).toBe(160);
    new Int16Array(target.buffer, target.offsetBytes, 4).set([1, -2, 3, -4]);
    expect(volume.slice(3)).toBeUndefined();
    expect([...volume.receive(3, undefined)]).toEqual([1, -2, 3, -4]);
    expect(volume.slice(3)).toBe(volume.receive(3, undefined));
  });

  it('takes the buffers of its workers as they are where it may not, without a copy', () => {
    const values = Int16Array.from([1, 2, 3, -4]).buffer;
    const volume = volumeOf({ isolated: false });
    expect(volume.receive(0, values).buffer).toBe(values);
  });

  it('is refused when there is no room for a few slices', () => {
    expect(createVolume(STACK, { budgetBytes: 3 * SLICE_BYTES })).toMatchObject({
      ok: false,
      refusal: { code: 'no-memory' },
    });
  });

  it('leaves what somebody still looks at as it is when it drops a slice', () => {
    const volume = volumeOf({ budgetBytes: 5 * SLICE_BYTES });
    const view = volume.receive(0, Int16Array.from([7, 7, 7, 7]).buffer);
    volume.drop(0);
    expect(volume.slice(0)).toBeUndefined();
    volume.receive(1, Int16Array.from([9, 9, 9, 9]).buffer);
    expect([...view]).toEqual([7, 7, 7, 7]);
  });
});

describe('The memory that a pair may take', () => {
  it('is two fifths of what the machine has, divided by size', () => {
    // 2⁻²⁷ GiB are 8 bytes; two stacks of 160 bytes share 0.4 of it equally.
    expect(memoryBudgets([STACK, STACK], 2 ** -27)).toEqual([1.6, 1.6]);
    expect(memoryBudgets([STACK], 2 ** -27)).toEqual([3.2]);
  });

  it('counts four GiB where the browser does not say', () => {
    expect(memoryBudgets([STACK], undefined)).toEqual([0.4 * 4 * 2 ** 30]);
  });
});

describe('The slices that are held of a stack that is too large', () => {
  it('lie around the shown one, and at the ends of the stack beside it', () => {
    expect(windowAround(10, 5, 20)).toEqual({ from: 8, to: 12 });
    expect(windowAround(0, 5, 20)).toEqual({ from: 0, to: 4 });
    expect(windowAround(19, 5, 20)).toEqual({ from: 15, to: 19 });
    expect(windowAround(3, 30, 20)).toEqual({ from: 0, to: 19 });
  });

  it('are read once, the shown one first, and no more than there is room for', async () => {
    const { soft, read } = reading({ shown: 10, capacity: 5 });
    await settled();
    expect(read[0]).toBe(10);
    expect(read).toHaveLength(5);
    expect(heldOf(soft)).toEqual([8, 9, 10, 11, 12]);
  });

  it('follow the plate, and one that was dropped is read again with the same values', async () => {
    const { soft, read, at, loading } = reading({ shown: 10, capacity: 5 });
    await settled();
    at.shown = 2;
    loading.look();
    await settled();
    expect(heldOf(soft)).toEqual([0, 1, 2, 3, 4]);
    at.shown = 10;
    loading.look();
    await settled();
    expect(heldOf(soft)).toEqual([8, 9, 10, 11, 12]);
    expect([...(soft.slice(10) ?? [])]).toEqual([10, 10, 10, 10]);
    expect(read).toHaveLength(15);
  });

  it('are never more than the room and what is on its way', async () => {
    const { soft, at, onSlice, loading } = reading({ shown: 0, capacity: 5 });
    let most = 0;
    onSlice.now = () => {
      most = Math.max(most, soft.size);
    };
    for (at.shown = 0; at.shown < 20; at.shown += 3) {
      loading.look();
      await settled();
    }
    expect(most).toBeLessThanOrEqual(6);
  });

  it('end with the signal, and not before', async () => {
    const { loading, abort } = reading({ shown: 0, capacity: 5 });
    let ended = false;
    void loading.done.then(() => {
      ended = true;
    });
    await settled();
    expect(ended).toBe(false);
    abort.abort();
    await loading.done;
  });
});

describe('A region on a slice that there is no room for', () => {
  /** A square of 2 × 2 pixels on the slice at z, mm. */
  const shapeAt = (z: number) =>
    ({
      kind: 'outline',
      pointsMm: [
        [-11, -21, z],
        [-9, -21, z],
        [-9, -19, z],
        [-11, -19, z],
      ],
    }) as const;

  it('keeps its value when its slice is dropped', async () => {
    const { soft, read, at, loading } = reading({ shown: 10, capacity: 5 });
    const measure = createMeasureShape(() => false);
    const shape = shapeAt(10);
    await settled();
    const before = measure(shape, { soft, sharp: undefined }).soft;
    expect(before).toMatchObject({ n: 4, meanHu: 10, sliceIndex: 10 });
    at.shown = 2;
    loading.look();
    await settled();
    expect(soft.slice(10)).toBeUndefined();
    expect(measure(shape, { soft, sharp: undefined }).soft).toBe(before);
    await settled();
    expect(read).toHaveLength(10);
  });

  it('keeps its value when its slice is dropped, and is measured on it again when the noise has become known', async () => {
    const { soft, at, loading, onSlice } = reading({ shown: 10, capacity: 5 });
    let noise: NoiseOfStack = FLAGS.noStandardErrorYet;
    const measure = createMeasureShape(
      () => false,
      () => noise,
    );
    const shape = shapeAt(10);
    const now = () => measure(shape, { soft, sharp: undefined }).soft;
    await settled();
    const before = now();
    at.shown = 2;
    loading.look();
    await settled();
    noise = FLAGS.noStandardErrorFewAreas;
    onSlice.now = () => {
      now();
    };
    expect(now()).toBe(before);
    await settled();
    expect(now()).toMatchObject({
      meanHu: 10,
      flags: expect.arrayContaining([FLAGS.noStandardErrorFewAreas]),
    });
  });

  it('is measured on its slice, which is read for it once and dropped again', async () => {
    const { soft, read, onSlice } = reading({ shown: 2, capacity: 5 });
    const measure = createMeasureShape(() => false);
    const shape = shapeAt(15);
    await settled();
    const passed: number[] = [];
    onSlice.now = (_kernel, index, passing) => {
      if (passing) passed.push(index);
      measure(shape, { soft, sharp: undefined });
    };
    expect(measure(shape, { soft, sharp: undefined }).soft).toBeNull();
    await settled();
    expect(passed).toEqual([15]);
    expect(heldOf(soft)).toEqual([0, 1, 2, 3, 4]);
    expect(measure(shape, { soft, sharp: undefined }).soft).toMatchObject({ n: 4, meanHu: 15 });
    await settled();
    expect(read).toHaveLength(6);
  });
});
