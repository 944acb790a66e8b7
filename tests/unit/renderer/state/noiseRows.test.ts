import { describe, expect, it } from 'vitest';
import type { KernelTexture } from '../../../../core/quality/index.js';
import type { AppState } from '../../../../renderer/state/appState.js';
import {
  chosenArea,
  goToArea,
  noiseAreaRows,
  texturesNow,
} from '../../../../renderer/state/noiseRows.js';
import { sampleState } from '../sample.js';

const texture = (sds: readonly number[]): KernelTexture => ({
  noiseSdHu: 10,
  areas: sds.length,
  frequencyPerMm: [0.1],
  powerHu2Mm2: [1],
  meanPerMm: 0.2,
  peakPerMm: 0.1,
  riseMm: null,
  blurFwhmMm: null,
  places: sds.map((sdHu, index) => ({ centreMm: [index, -10, index], sdHu, meanHu: 50 })),
});

/** A state whose note has kept the textures of the pair on the plates. */
function kept(): AppState {
  const state = sampleState();
  if (state.note === undefined) throw new Error('no note');
  const soft = texture([8, 9]);
  const sharp = texture([30, 31]);
  return {
    ...state,
    note: { ...state.note, pair: { ...state.note.pair, texture: { soft, sharp } } },
  } as AppState;
}

describe('The areas of the noise panel', () => {
  it('have their slice and their SD on both kernels, in the order of measuring', () => {
    expect(noiseAreaRows(kept())).toEqual([
      { number: 1, centreMm: [0, -10, 0], slice: 1, softSdHu: 8, sharpSdHu: 30 },
      { number: 2, centreMm: [1, -10, 1], slice: 2, softSdHu: 9, sharpSdHu: 31 },
    ]);
  });

  it('are gone to: the slice, the outlines, and the chosen one; none chosen, and none is', () => {
    const state = kept();
    const rows = noiseAreaRows(state);
    const there = goToArea(rows[1])(state);
    expect(there.plates.soft.alongMm).toBe(1);
    expect(there.noiseAreas).toBe(true);
    expect(chosenArea(noiseAreaRows(there), there)?.number).toBe(2);
    expect(chosenArea(rows, goToArea(undefined)(there))).toBeUndefined();
  });

  it('rest on what the note has kept only for the stacks that are on the plates', () => {
    const state = kept();
    expect(texturesNow(state).soft?.noiseSdHu).toBe(10);
    const pair = state.pair && { ...state.pair, soft: { ...state.pair.soft, key: 'other' } };
    expect(texturesNow({ ...state, pair })).toEqual({ soft: undefined, sharp: undefined });
    expect(noiseAreaRows({ ...state, pair })).toEqual([]);
  });
});
