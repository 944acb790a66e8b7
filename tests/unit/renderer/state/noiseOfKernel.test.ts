import { describe, expect, it } from 'vitest';
import type { KernelTexture } from '../../../../core/quality/index.js';
import { FLAGS } from '../../../../core/region/index.js';
import type { MeasuredPair } from '../../../../renderer/pairing/measuredPair.js';
import type { AppState } from '../../../../renderer/state/appState.js';
import { keepMeasured } from '../../../../renderer/state/changes/assessment.js';
import { noiseOfKernel } from '../../../../renderer/state/noiseOfKernel.js';
import { sampleState } from '../sample.js';

const texture = (noiseSdHu: number): KernelTexture => ({
  noiseSdHu,
  areas: 8,
  frequencyPerMm: [0.02, 1],
  powerHu2Mm2: [1, 1],
  meanPerMm: 0.5,
  peakPerMm: 0.5,
  riseMm: null,
  blurFwhmMm: null,
});
const [soft, sharp] = [texture(8), texture(30)];

function measuredOf({ pair }: AppState, swapped = false): MeasuredPair {
  if (pair?.sharp === undefined) throw new Error('invalid sample');
  const [first, second] = swapped ? [pair.sharp, pair.soft] : [pair.soft, pair.sharp];
  return {
    softKey: pair.soft.key,
    sharpKey: pair.sharp.key,
    evidence: [],
    measuredSharpKey: pair.sharp.key,
    textures: { [first.key]: soft, [second.key]: sharp },
  } as unknown as MeasuredPair;
}

describe('The noise of a kernel', () => {
  const start = sampleState();

  it('is that which was measured of its stack', () => {
    const state: AppState = { ...start, assessment: { kind: 'done', measured: measuredOf(start) } };
    expect(noiseOfKernel(state, 'soft')).toBe(soft);
    expect(noiseOfKernel(state, 'sharp')).toBe(sharp);
  });

  it('follows the stack when soft and sharp have changed places', () => {
    const measured = measuredOf(start, true);
    const state: AppState = { ...start, assessment: { kind: 'done', measured } };
    expect(noiseOfKernel(state, 'soft')).toBe(sharp);
    expect(keepMeasured(measured, '2026-01-10T11:00:00Z')(start).note?.pair.texture).toEqual({
      soft: sharp,
      sharp: soft,
    });
  });

  it('is kept in the note with the evidence, and taken from it until the pair is measured again', () => {
    const kept = keepMeasured(measuredOf(start), '2026-01-10T11:00:00Z')(start);
    expect(kept.note?.pair.texture).toEqual({ soft, sharp });
    const opened: AppState = { ...kept, assessment: { kind: 'none' } };
    expect(noiseOfKernel(opened, 'sharp')).toBe(kept.note?.pair.texture.sharp);
  });

  it('says why there is none', () => {
    expect(noiseOfKernel(start, 'soft')).toBe(FLAGS.noStandardErrorYet);
    expect(
      noiseOfKernel({ ...start, assessment: { kind: 'failed', text: 'given up' } }, 'soft'),
    ).toBe(FLAGS.noStandardError);
    const few = { ...measuredOf(start), textures: {} };
    expect(noiseOfKernel({ ...start, assessment: { kind: 'done', measured: few } }, 'sharp')).toBe(
      FLAGS.noStandardErrorFewAreas,
    );
    const alone = start.pair && { ...start.pair, sharp: undefined };
    expect(noiseOfKernel({ ...start, pair: alone }, 'soft')).toBe(FLAGS.noStandardErrorAlone);
  });
});
