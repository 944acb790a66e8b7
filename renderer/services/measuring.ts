import type { NoteRegion, RegionValues } from '../../core/note/index.js';
import { FLAGS, notMeasured, type Shape } from '../../core/region/index.js';
import { remeasured } from '../state/changes/remeasure.js';
import type { Store } from '../state/store.js';
import type { PairVolumes } from '../volumes/loadPair.js';
import { createMeasureShape } from '../volumes/measureShape.js';
import { changedValuesText } from './changedValuesText.js';

/** Measuring on the pixels of the plates. */
export interface Measuring {
  /** What a shape measures on both stacks now. */
  measure(shape: Shape): RegionValues;
  /** Measures all regions again, after slices have come or an undo. */
  remeasure(): void;
}

/** @param volumes the pixels now; undefined while nothing is shown */
export function createMeasuring(
  store: Store,
  volumes: () => PairVolumes | undefined,
  now: () => string,
): Measuring {
  const measureShape = createMeasureShape((volume, index) => {
    const { pair, loading } = store.now();
    const kernel = volume.stack === pair?.soft ? 'soft' : 'sharp';
    return loading[kernel].gaps.has(index);
  });
  const measure = (shape: Shape): RegionValues => {
    const both = volumes();
    if (both === undefined) return { soft: null, sharp: null };
    if (store.now().pair?.link !== 'index') return measureShape(shape, both);
    const { soft } = measureShape(shape, { soft: both.soft, sharp: undefined });
    const sharp = both.sharp && notMeasured(shape, FLAGS.positionsNotComparable);
    return { soft, sharp: sharp ?? null };
  };
  return {
    measure,
    remeasure: () => {
      const { note } = store.now();
      if (note === undefined || note.verification === 'VERIFIED') return;
      const result = remeasured(note, ({ shape }: NoteRegion) => measure(shape), now());
      if (result.note === note) return;
      const text = changedValuesText(result.changed);
      store.change('Measure', (state) => ({
        ...state,
        note: result.note,
        message: text === undefined ? state.message : { tone: 'warning', text },
      }));
    },
  };
}
