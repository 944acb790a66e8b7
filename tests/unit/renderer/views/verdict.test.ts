import { describe, expect, it } from 'vitest';
import type { Evidence } from '../../../../core/note/index.js';
import type { MeasuredPair } from '../../../../renderer/pairing/measuredPair.js';
import type { PairState } from '../../../../renderer/state/appState.js';
import { verdictOf } from '../../../../renderer/views/verdict.js';
import { sampleStack, sampleState } from '../sample.js';

const says = (check: string, state: Evidence['state']): Evidence => ({
  check,
  state,
  text: `${check}: ${state}`,
});

const ACTIONS = { onSwap: () => {}, onCancel: () => {}, onMeasure: () => {} };

const soft = sampleStack({ series: '2.25.5.1' });
const sharp = sampleStack({ series: '2.25.5.2' });

const pairWith = (evidence: readonly Evidence[], more: Partial<PairState> = {}): PairState => ({
  soft,
  sharp,
  link: 'position',
  evidence,
  overrides: [],
  chosenBy: 'reader',
  ...more,
});

const measured = (change: Partial<MeasuredPair> = {}): MeasuredPair => ({
  softKey: soft.key,
  sharpKey: sharp.key,
  verdict: 'pair',
  evidence: [],
  sharpness: {
    decided: true,
    sharper: 'second',
    confidence: 0.98,
    noiseSoftHu: 6.1,
    noiseSharpHu: 26.93,
    frequencySoft: 0.213,
    frequencySharp: 0.468,
    edgeSoftMm: null,
    edgeSharpMm: null,
    text: 'the second is sharper',
  },
  shift: { shiftMm: [0.012, -0.016, 0], places: [], limitMm: 0.25 },
  measuredSharpKey: sharp.key,
  areas: [],
  spectra: {},
  textures: {},
  ...change,
});

const AGREED = [says('patient', 'agrees'), says('phase', 'agrees')].concat(
  says('frame of reference', 'agrees'),
);

describe('The verdict on a measured pair', () => {
  it('says in two lines what agrees and what was measured', () => {
    const verdict = verdictOf(pairWith(AGREED), { kind: 'done', measured: measured() }, ACTIONS);
    expect(verdict.verdict).toBe('pair');
    // The shift's length by hand: √(0.012² + 0.016²) = 0.02.
    expect(verdict.lines).toEqual([
      'same phase · same frame · shift 0.02 mm',
      'noise 6.1 → 26.9 HU · texture 0.21 → 0.47 /mm',
    ]);
    expect(verdict.actions).toEqual([]);
  });

  it('names its reservations first', () => {
    const pair = pairWith([
      ...AGREED,
      says('thickness', 'differs'),
      says('kernel label', 'differs'),
    ]);
    const verdict = verdictOf(pair, { kind: 'done', measured: measured() }, ACTIONS);
    expect(verdict.verdict).toBe('reservations');
    expect(verdict.lines[0]).toBe('Thickness differs.');
  });

  it('offers to swap where the measure contradicts the plates, and only there', () => {
    const wrong = measured({ measuredSharpKey: soft.key });
    const verdict = verdictOf(pairWith(AGREED), { kind: 'done', measured: wrong }, ACTIONS);
    expect(verdict.actions?.map(({ label }) => label)).toEqual(['Swap soft and sharp']);
    expect(verdict.lines[0]).toContain('look swapped');
  });

  it('says so when the measure could not tell', () => {
    const { sharpness } = measured();
    const open = measured({
      measuredSharpKey: undefined,
      sharpness: { ...sharpness, decided: false, text: 'the evidence is too weak' },
    });
    const verdict = verdictOf(pairWith(AGREED), { kind: 'done', measured: open }, ACTIONS);
    expect(verdict.lines[0]).toBe('Which is the sharper was not told: the evidence is too weak.');
    expect(verdict.actions).toEqual([]);
  });
});

describe('The verdict before that', () => {
  it('is being measured, and says what the files make of it', () => {
    const verdict = verdictOf(
      pairWith(AGREED),
      { kind: 'running', progress: { done: 4, text: '' } },
      ACTIONS,
    );
    expect(verdict.verdict).toBe('measuring');
    expect(verdict.lines).toEqual(['One acquisition by the files.', '4 slices looked at']);
    expect(verdict.actions?.map(({ label }) => label)).toEqual(['Cancel']);
  });

  it('rests on the files alone where the measuring was given up, and can be begun again', () => {
    const verdict = verdictOf(pairWith(AGREED), { kind: 'failed', text: 'Given up.' }, ACTIONS);
    expect(verdict.verdict).toBe('pair');
    expect(verdict.lines).toEqual(['Given up.']);
    expect(verdict.actions?.map(({ label }) => label)).toEqual(['Measure the pair']);
  });

  it('warns for as long as the plates are linked by number', () => {
    const { pair } = sampleState({ link: 'index' });
    const verdict = verdictOf(pair, { kind: 'done', measured: measured() }, ACTIONS);
    expect(verdict.lines[0]).toBe('Linked by slice number: positions can’t be compared.');
  });
});
