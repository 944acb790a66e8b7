import {
  type EdgeValues,
  type Kernel,
  type NoteRegion,
  type RegionValues,
  withEdgeValues,
} from '../../core/note/index.js';
import {
  type BandLine,
  edgeNotMeasured,
  FLAGS,
  notMeasured,
  type Shape,
} from '../../core/region/index.js';
import { remeasured } from '../state/changes/remeasure.js';
import { noiseOfKernel } from '../state/noiseOfKernel.js';
import type { Store } from '../state/store.js';
import type { PairVolumes } from '../volumes/loadPair.js';
import { createMeasureEdge } from '../volumes/measureEdge.js';
import { createMeasureShape } from '../volumes/measureShape.js';
import type { Volume } from '../volumes/volume.js';
import { changedValuesText } from './changedValuesText.js';

/** Measuring on the pixels of the plates. */
export interface Measuring {
  /** What a shape measures on both stacks now. */
  measure(shape: Shape): RegionValues;
  /** What an edge line measures on both stacks now. */
  measureEdge(line: BandLine): EdgeValues;
  /** Measures all regions and edge lines again, after slices have come, the noise was measured, or an undo. */
  remeasure(): void;
}

/** @param volumes the pixels now; undefined while nothing is shown */
export function createMeasuring(
  store: Store,
  volumes: () => PairVolumes | undefined,
  now: () => string,
): Measuring {
  const kernelOf = ({ stack }: Volume): Kernel =>
    stack === store.now().pair?.soft ? 'soft' : 'sharp';
  const measureShape = createMeasureShape(
    (volume, index) => store.now().loading[kernelOf(volume)].gaps.has(index),
    (volume) => noiseOfKernel(store.now(), kernelOf(volume)),
  );
  const measure = (shape: Shape): RegionValues => {
    const both = volumes();
    if (both === undefined) return { soft: null, sharp: null };
    if (store.now().pair?.link !== 'index') return measureShape(shape, both);
    const { soft } = measureShape(shape, { soft: both.soft, sharp: undefined });
    const sharp = both.sharp && notMeasured(shape, FLAGS.positionsNotComparable);
    return { soft, sharp: sharp ?? null };
  };
  const measureLine = createMeasureEdge((volume, index) =>
    store.now().loading[kernelOf(volume)].gaps.has(index),
  );
  const measureEdge = (line: BandLine): EdgeValues => {
    const both = volumes();
    if (both === undefined) return { soft: null, sharp: null };
    if (store.now().pair?.link !== 'index') return measureLine(line, both);
    const { soft } = measureLine(line, { soft: both.soft, sharp: undefined });
    const sharp = both.sharp && edgeNotMeasured(FLAGS.positionsNotComparable);
    return { soft, sharp: sharp ?? null };
  };
  return {
    measure,
    measureEdge,
    remeasure: () => {
      const { note } = store.now();
      if (note === undefined || note.verification === 'VERIFIED') return;
      const result = remeasured(note, ({ shape }: NoteRegion) => measure(shape), now());
      const measured = withEdgeValues(result.note, measureEdge, now());
      if (measured === note) return;
      const text = changedValuesText(result.changed);
      store.change('Measure', (state) => ({
        ...state,
        note: measured,
        message: text === undefined ? state.message : { tone: 'warning', text },
      }));
    },
  };
}
