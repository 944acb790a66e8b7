import { describe, expect, it } from 'vitest';
import { success } from '../../../../core/result.js';
import type { MeasuredPair } from '../../../../renderer/pairing/measuredPair.js';
import { createAssessment } from '../../../../renderer/services/assessment.js';
import { pairMessage } from '../../../../renderer/services/pairMessage.js';
import type { PairState } from '../../../../renderer/state/appState.js';
import { createStore } from '../../../../renderer/state/store.js';
import { sampleState } from '../sample.js';

const SHIFT = { check: 'shift', state: 'agrees', text: 'shift 0.02 mm' } as const;

/** Measures at once, and finds the given stack to be the sharper one. */
async function assess(chosenBy: PairState['chosenBy'], sharper: 'soft' | 'sharp') {
  const start = sampleState();
  if (start.pair?.sharp === undefined) throw new Error('invalid sample');
  const pair = { ...start.pair, chosenBy };
  const message = pairMessage(pair);
  const store = createStore({ ...start, pair, message });
  const measured = {
    softKey: pair.soft.key,
    sharpKey: pair.sharp?.key,
    measuredSharpKey: pair[sharper]?.key,
    evidence: [SHIFT],
    textures: {},
  } as unknown as MeasuredPair;
  let swaps = 0;
  let told = 0;
  const work = createAssessment({
    store,
    assessor: { assess: async () => success(measured) },
    now: () => '2026-01-10T11:00:00Z',
    onMeasured: () => {
      told += 1;
    },
    onWrongOrder: () => {
      swaps += 1;
    },
  });
  work.begin(pair, 'grant', new AbortController().signal);
  expect(store.now().assessment.kind).toBe('running');
  await new Promise((done) => setTimeout(done));
  // The regions are measured again with the noise that is known now, once.
  expect(told).toBe(1);
  return { state: store.now(), swaps };
}

describe('The measure of the pair', () => {
  it('is kept in the note as the evidence of the pair', async () => {
    const { state } = await assess('reader', 'sharp');
    expect(state.assessment.kind).toBe('done');
    expect(state.note?.pair.evidence).toEqual([SHIFT]);
    expect(state.note?.changedAt).toBe('2026-01-10T11:00:00Z');
    expect(state.history.undo).toEqual([]);
  });

  it('puts soft and sharp in order where only the series numbers had decided', async () => {
    expect((await assess('order', 'soft')).swaps).toBe(1);
    expect((await assess('order', 'sharp')).swaps).toBe(0);
    expect((await assess('order', 'sharp')).state.pair?.chosenBy).toBe('measure');
  });

  it('takes the request to check the order back once it is measured', async () => {
    expect((await assess('order', 'sharp')).state.message).toBeUndefined();
    expect((await assess('order', 'soft')).state.message?.text).toContain('Please check');
  });

  it('never swaps what the reader chose, or what the note remembers', async () => {
    expect((await assess('reader', 'soft')).swaps).toBe(0);
    expect((await assess('note', 'soft')).swaps).toBe(0);
  });
});
