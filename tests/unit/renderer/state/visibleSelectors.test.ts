import { describe, expect, it } from 'vitest';
import {
  addContrast,
  addRegion,
  type Note,
  type RegionValues,
  setVisibility,
} from '../../../../core/note/index.js';
import type { KernelTexture } from '../../../../core/quality/index.js';
import type { RegionValue, Role, Shape } from '../../../../core/region/index.js';
import type { MeasuredPair } from '../../../../renderer/pairing/measuredPair.js';
import type { AppState } from '../../../../renderer/state/appState.js';
import { keepMeasured } from '../../../../renderer/state/changes/assessment.js';
import {
  askedVisibility,
  ownPlace,
  pairTexture,
} from '../../../../renderer/state/visibleSelectors.js';
import { sampleState } from '../sample.js';

const NOW = '2026-01-05T09:30:00.000Z';

const value = (meanHu: number): RegionValue => ({
  n: 50,
  meanHu,
  sdHu: 10,
  minHu: meanHu - 20,
  maxHu: meanHu + 20,
  medianHu: meanHu,
  areaMm2: 6,
  sampledAreaMm2: 6,
  snr: meanHu / 10,
  sliceIndex: 1,
  sliceOffsetMm: 0,
  sopInstanceUid: '1.2.3',
  frameNumber: null,
  standardErrorHu: null,
  placementHu: null,
  flags: [],
});

const ELLIPSE: Shape = { kind: 'ellipse', centreMm: [0, 0, 1], radiiMm: [1, 1.44] };
/** A square of 2 mm, whose area is that of a disc of 2.257 mm (2√(4/π)). */
const SQUARE: Shape = {
  kind: 'outline',
  pointsMm: [
    [0, 0, 1],
    [2, 0, 1],
    [2, 2, 1],
    [0, 2, 1],
  ],
};

function marked(note: Note): Note {
  const add = (to: Note, role: Role, shape: Shape, values: RegionValues): Note =>
    addRegion(to, { role, shape, ...values }, NOW).note;
  const regions = [
    ['lumen', ELLIPSE, 400, 380],
    ['wall', SQUARE, 100, 140],
    ['lumen', SQUARE, 300, 290],
    ['fat', SQUARE, -90, -92],
  ] as const;
  const all = regions.reduce(
    (to, [role, shape, soft, sharp]) =>
      add(to, role, shape, { soft: value(soft), sharp: value(sharp) }),
    note,
  );
  return ['L1', 'L2'].reduce((to, lumen) => {
    const added = addContrast(to, { lumen, wall: 'W1', noise: 'wall' }, NOW);
    if (!added.ok) throw new Error(added.refusal.text);
    return added.value.note;
  }, all);
}

const state = ((): AppState => {
  const made = sampleState();
  if (made.note === undefined) throw new Error('the sample has no note');
  return { ...made, note: marked(made.note) };
})();

describe('What is asked about visibility', () => {
  it('is k = 5 at the note’s first contrast, or at that of the selected region', () => {
    expect(askedVisibility(state)).toEqual({ k: 5, contrast: { id: 'C1' } });
    expect(askedVisibility({ ...state, selected: 'L2' })).toEqual({ k: 5, contrast: { id: 'C2' } });
    expect(askedVisibility(sampleState())).toEqual({ k: 5, contrast: undefined });
  });

  it('is what the reader chose, whatever is selected', () => {
    if (state.note === undefined) throw new Error('no note');
    const note = setVisibility(state.note, { k: 3, contrast: { hu: 60 } }, NOW);
    expect(askedVisibility({ ...state, note, selected: 'L2' })).toEqual({
      k: 3,
      contrast: { hu: 60 },
    });
  });
});

describe('The region’s own place in the plot', () => {
  it('is its contrast on each kernel against the diameter of a disc of its area', () => {
    // By hand: 2·√(π·1·1.44/π) = 2.4 mm.
    const place = ownPlace({ ...state, selected: 'L1' });
    expect(place?.label).toBe('Lumen 1');
    expect(place?.points).toEqual([
      { kernel: 'soft', diameterMm: expect.closeTo(2.4, 10), contrastHu: 300 },
      { kernel: 'sharp', diameterMm: expect.closeTo(2.4, 10), contrastHu: 240 },
    ]);
    expect(ownPlace({ ...state, selected: 'L2' })?.points[0]?.diameterMm).toBeCloseTo(2.2568, 4);
  });

  it('is that of the lumen asked about where nothing is selected, and none for a region without a contrast', () => {
    expect(ownPlace(state)?.label).toBe('Lumen 1');
    expect(ownPlace({ ...state, selected: 'F1' })).toBeUndefined();
    expect(ownPlace(sampleState())).toBeUndefined();
  });
});

describe('The textures of the pair', () => {
  /** White noise without blur: the smallest disc is 2k·√(NPS/π)/contrast (Rose 1948). */
  const white = (powerHu2Mm2: number): KernelTexture => ({
    noiseSdHu: 25,
    areas: 8,
    frequencyPerMm: [0.02, 0.4, 1.2],
    powerHu2Mm2: [powerHu2Mm2, powerHu2Mm2, powerHu2Mm2],
    meanPerMm: 0.6,
    peakPerMm: 0.4,
    riseMm: 0,
    blurFwhmMm: 0,
  });
  const [soft, sharp] = [white(100), white(400)];
  const measured: MeasuredPair = {
    softKey: '2.25.88001.2',
    sharpKey: '2.25.88001.3',
    verdict: 'pair',
    evidence: [],
    sharpness: {
      decided: true,
      sharper: 'second',
      confidence: 1,
      noiseSoftHu: 25,
      noiseSharpHu: 50,
      frequencySoft: 0.6,
      frequencySharp: 0.6,
      edgeSoftMm: 0,
      edgeSharpMm: 0,
      text: 'the second is sharper',
    },
    shift: { shiftMm: null, places: [], limitMm: 0.25 },
    measuredSharpKey: '2.25.88001.3',
    areas: [],
    spectra: {},
    textures: { '2.25.88001.2': soft, '2.25.88001.3': sharp },
  };

  it('are undefined until they were measured', () => {
    expect(pairTexture(state)).toBeUndefined();
  });

  it('come with the assessment of the pair, and give what was asked before its diameters', () => {
    if (state.note === undefined) throw new Error('no note');
    const note = setVisibility(state.note, { k: 5, contrast: { hu: 60 } }, NOW);
    expect(note.visibility?.softMm).toBeNull();
    const after = keepMeasured(measured, NOW)({ ...state, note });
    expect(pairTexture(after)).toEqual({ soft, sharp });
    // By hand: 2·5·√(100/π)/60 and 2·5·√(400/π)/60.
    expect(after.note?.visibility?.softMm).toBeCloseTo(0.94, 2);
    expect(after.note?.visibility?.sharpMm).toBeCloseTo(1.881, 2);
  });

  it('are those of the present measure where a verified note has none', () => {
    if (state.note === undefined) throw new Error('no note');
    const note: Note = { ...state.note, verification: 'VERIFIED' };
    const after = keepMeasured(measured, NOW)({ ...state, note });
    expect(after.note).toBe(note);
    expect(pairTexture(after)).toEqual({ soft, sharp });
  });
});
