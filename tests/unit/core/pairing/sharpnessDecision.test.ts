import { describe, expect, it } from 'vitest';
import {
  decideSharpness,
  type SharpnessEvidence,
} from '../../../../core/pairing/sharpnessDecision.js';

const estimate = (value: number, standardError = 0.005) => ({ value, standardError });

/** The second has the wider band: more noise, finer grain, steeper edges. */
const wider: SharpnessEvidence = {
  noise: estimate(0.4),
  frequency: estimate(0.2),
  frequencyTellsDirection: true,
  frequencyComparable: true,
  rise: estimate(-0.2),
  thickness: 'same',
  lossy: false,
};
const equal: SharpnessEvidence = {
  ...wider,
  noise: estimate(0.01),
  frequency: estimate(-0.01),
  rise: estimate(0.01),
};
const said = (change: Partial<SharpnessEvidence>, from = wider) => {
  const { outcome, softer, text } = decideSharpness({ ...from, ...change });
  return [outcome, softer, text];
};

describe('decideSharpness', () => {
  it('calls softer the one with less and coarser noise and wider edges', () => {
    expect(decideSharpness(wider)).toEqual({
      outcome: 'order',
      softer: 'first',
      confidence: 0.98,
      text: 'the second is sharper',
    });
    const mirrored = { noise: estimate(-0.4), frequency: estimate(-0.2), rise: estimate(0.2) };
    expect(said(mirrored)).toEqual(['order', 'second', 'the first is sharper']);
  });

  it('is undecided when the edges contradict the noise', () => {
    expect(said({ rise: estimate(0.2) })).toEqual([
      'undecided',
      undefined,
      'can’t tell: noise and edges contradict each other',
    ]);
  });

  it('is undecided when nothing supports the frequency', () => {
    expect(said({ noise: estimate(0.01), rise: estimate(0) })[0]).toBe('undecided');
  });

  it('takes noise for no sign of the kernel where thickness differs or is not stated', () => {
    // The sharper one is thicker and has less noise: grain and edges decide.
    expect(said({ noise: estimate(-0.3), thickness: 'differs' })[1]).toBe('first');
    expect(said({ noise: estimate(-0.3), thickness: 'unknown' })[1]).toBe('first');
    expect(said({ noise: estimate(-0.3) })[0]).toBe('undecided');
    expect(said({ rise: estimate(0), thickness: 'differs' })[0]).toBe('undecided');
  });

  it('orders without a frequency only when noise and edges agree clearly', () => {
    const folded = { frequencyTellsDirection: false };
    expect(said(folded)[1]).toBe('first');
    expect(said({ ...folded, rise: estimate(-0.05) })[0]).toBe('undecided');
    expect(said({ ...folded, thickness: 'differs' })).toEqual([
      'undecided',
      undefined,
      'can’t tell: the noise is finer than the pixels can carry, and the rest is not clear enough',
    ]);
  });

  it('asks for all three after lossy compression, and finds no sameness then', () => {
    expect(said({ lossy: true })[1]).toBe('first');
    expect(said({ lossy: true, rise: estimate(-0.06) })[0]).toBe('undecided');
    expect(said({ lossy: true }, equal)[0]).toBe('undecided');
  });

  it('recognises one kernel when nothing differs', () => {
    expect(said({}, equal)).toEqual(['same-kernel', undefined, 'same kernel']);
    expect(said({ frequency: estimate(0, 0.04) }, equal)[0]).toBe('undecided');
    expect(said({ frequencyComparable: false }, equal)[0]).toBe('undecided');
  });

  it('recognises thickness alone: less noise with the same grain and edges', () => {
    const thicker = { noise: estimate(-0.5), thickness: 'differs' } as const;
    expect(said(thicker, equal)).toEqual(['thickness-alone', undefined, 'thickness alone']);
    expect(said({ ...thicker, thickness: 'same' }, equal)[0]).toBe('noise-alone');
    expect(said({ ...thicker, rise: estimate(-0.2) }, equal)[0]).toBe('undecided');
  });

  it('takes no sameness from noise that the grid folds, unless level and stated thickness agree too', () => {
    const folded = { frequencyTellsDirection: false };
    expect(said(folded, equal)[0]).toBe('same-kernel');
    expect(said({ ...folded, thickness: 'differs' }, equal)[0]).toBe('undecided');
    // Two wide kernels on a coarse grid: the level differs, the folded grain hardly does.
    const wide = { noise: estimate(-0.14, 0.011), frequency: estimate(-0.034, 0.009) };
    expect(said({ ...folded, ...wide, rise: estimate(0.015, 0.038) })[0]).toBe('undecided');
  });

  it('says what is missing', () => {
    const { noise: _, frequency: __, rise: ___, ...nothing } = wider;
    const bare = { ...nothing, frequencyTellsDirection: false, frequencyComparable: false };
    expect(decideSharpness(bare).text).toBe(
      'can’t tell: no uniform area and no clear edge in common',
    );
    expect(decideSharpness({ ...bare, rise: estimate(-0.2) }).text).toBe(
      'can’t tell: no uniform area in common',
    );
  });

  it('never gives an order with a confidence of 0.5, and none without one above it', () => {
    for (const one of [wider, equal, { ...wider, rise: estimate(0.2) }]) {
      const { softer, confidence } = decideSharpness(one);
      expect(confidence > 0.5).toBe(softer !== undefined);
    }
  });
});
