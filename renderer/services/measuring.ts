import {
  type CutFacts,
  type EdgeValues,
  type Kernel,
  type NotePlane,
  type NoteRegion,
  type PlacedProfile,
  type ProfileValues,
  type RegionValues,
  withCutFacts,
  withEdgeValues,
  withProfileValues,
} from '../../core/note/index.js';
import {
  type CutSlice,
  measureEdgeLineOnCut,
  measureProfileOnCut,
  measureRegionOnCut,
} from '../../core/oblique/index.js';
import {
  type BandLine,
  edgeNotMeasured,
  FLAGS,
  type Flag,
  measureEdgeLine,
  type NoiseOfStack,
  notMeasured,
  type Shape,
} from '../../core/region/index.js';
import { measureProfile, notProfiled, type ProfileValue } from '../../core/stent/index.js';
import { remeasured } from '../state/changes/remeasure.js';
import { noiseOfKernel } from '../state/noiseOfKernel.js';
import type { Store } from '../state/store.js';
import type { Cuts } from '../volumes/cuts.js';
import type { PairVolumes } from '../volumes/loadPair.js';
import { createMeasureLine, type LineValues } from '../volumes/measureLine.js';
import { createMeasureShape } from '../volumes/measureShape.js';
import type { Volume } from '../volumes/volume.js';
import { changedValuesText } from './changedValuesText.js';

/** Measuring on the pixels of the plates; with the identifier of an oblique plane, on its cut. */
export interface Measuring {
  /** What a shape measures on both stacks now. */
  measure(shape: Shape, plane?: string): RegionValues;
  /** What an edge line measures on both stacks now. */
  measureEdge(line: BandLine, plane?: string): EdgeValues;
  /** What a profile measures on both stacks now. */
  measureProfile(line: PlacedProfile): ProfileValues;
  /** Measures all that the note holds again, after slices have come, the noise was measured, or an undo. */
  remeasure(): void;
}

/** How one kind of thing is measured, and what it has where it can't be. */
interface Ways<T, V> {
  readonly onSlices: (of: T, volumes: PairVolumes) => LineValues<V>;
  readonly onCut: (of: T, cut: CutSlice, noise: NoiseOfStack) => V;
  readonly not: (of: T, why: Flag) => V;
}

/** @param volumes the pixels now; undefined while nothing is shown */
export function createMeasuring(
  store: Store,
  volumes: () => PairVolumes | undefined,
  cuts: Cuts,
  now: () => string,
): Measuring {
  const kernelOf = ({ stack }: Volume): Kernel =>
    stack === store.now().pair?.soft ? 'soft' : 'sharp';
  const isGap = (volume: Volume, index: number): boolean =>
    store.now().loading[kernelOf(volume)].gaps.has(index);
  const noiseOf = (volume: Volume) => noiseOfKernel(store.now(), kernelOf(volume));

  const measureWith = <T, V>(of: T, plane: string | undefined, ways: Ways<T, V>): LineValues<V> => {
    const both = volumes();
    if (both === undefined) return { soft: null, sharp: null };
    if (plane !== undefined) return onCuts(of, plane, ways);
    if (store.now().pair?.link !== 'index') return ways.onSlices(of, both);
    const { soft } = ways.onSlices(of, { soft: both.soft, sharp: undefined });
    const sharp = both.sharp && ways.not(of, FLAGS.positionsNotComparable);
    return { soft, sharp: sharp ?? null };
  };

  const planeOf = (id: string): NotePlane | undefined =>
    store.now().note?.planes.find((plane) => plane.id === id);

  const onCuts = <T, V>(of: T, id: string, { onCut, not }: Ways<T, V>): LineValues<V> => {
    const plane = planeOf(id);
    const cut = plane && cuts.of(plane);
    if (cut === undefined) return { soft: null, sharp: null };
    if (!cut.ok) {
      const none = not(of, cut.refusal);
      return { soft: none, sharp: volumes()?.sharp === undefined ? null : none };
    }
    // Before all slices have come a value would rest on a part of the plane.
    if (!cut.value.isWhole) return { soft: null, sharp: null };
    const { soft, sharp } = cut.value;
    const noise = (kernel: Kernel): NoiseOfStack => noiseOfKernel(store.now(), kernel);
    return {
      soft: onCut(of, soft, noise('soft')),
      sharp: sharp === undefined ? null : onCut(of, sharp, noise('sharp')),
    };
  };

  const shapes: Ways<Shape, NonNullable<RegionValues['soft']>> = {
    onSlices: createMeasureShape(isGap, noiseOf),
    onCut: measureRegionOnCut,
    not: notMeasured,
  };
  const edges: Ways<BandLine, NonNullable<EdgeValues['soft']>> = {
    onSlices: createMeasureLine(
      (line, stack, storedOf) => measureEdgeLine(line, stack, storedOf),
      isGap,
    ),
    onCut: measureEdgeLineOnCut,
    not: (_line, why) => edgeNotMeasured(why),
  };
  const profiles: Ways<PlacedProfile, ProfileValue> = {
    onSlices: createMeasureLine(
      measureProfile,
      isGap,
      (a: PlacedProfile, b) => a.bandMm === b.bandMm && a.nominalMm === b.nominalMm,
      noiseOf,
    ),
    onCut: measureProfileOnCut,
    not: (_line, why) => notProfiled(why),
  };

  const measure: Measuring['measure'] = (shape, plane) => measureWith(shape, plane, shapes);
  const measureEdge: Measuring['measureEdge'] = (line, plane) => measureWith(line, plane, edges);
  const measureAcross: Measuring['measureProfile'] = (line) => {
    const { soft, sharp } = measureWith(line, line.plane, profiles);
    return { soft: kept(soft), sharp: kept(sharp) };
  };
  const factsOf = (plane: NotePlane): CutFacts | null => {
    const cut = cuts.of(plane);
    return cut?.ok === true && cut.value.isWhole ? cut.value.facts : null;
  };

  return {
    measure,
    measureEdge,
    measureProfile: measureAcross,
    remeasure: () => {
      const { note } = store.now();
      if (note === undefined || note.verification === 'VERIFIED') return;
      const at = now();
      const ofRegion = ({ shape, plane }: NoteRegion) => measure(shape, plane);
      const result = remeasured(note, ofRegion, at);
      const withEdges = withEdgeValues(result.note, (edge) => measureEdge(edge, edge.plane), at);
      const withLines = withProfileValues(withEdges, measureAcross, at);
      const measured = withCutFacts(withLines, factsOf, at);
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

/** What the note keeps of a profile: its samples are read from the images again. */
function kept(value: ProfileValue | null): ProfileValues['soft'] {
  if (value === null) return null;
  const { samples: _samples, ...rest } = value;
  return rest;
}
