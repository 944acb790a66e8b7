import { describe, expect, it } from 'vitest';
import { readHeader } from '../../../../core/dicom/index.js';
import { headerEvidence, reasonNotToMeasure } from '../../../../core/pairing/index.js';
import { buildStacks, type Stack } from '../../../../core/stack/index.js';
import { CORPUS_ROOT, type CtSliceOptions, ctSlice } from '../../../corpus/ctSlice.js';

function stackAt(from: number, options: CtSliceOptions = {}): Stack {
  const files = [0, 1, 2].map((step) => {
    const bytes = ctSlice({ z: from + step, number: step, ...options });
    const reading = readHeader(bytes, bytes.length);
    if (reading.kind !== 'image') throw new Error(reading.kind);
    return { fileId: step, file: `f${step}`, image: reading.images[0] };
  });
  const [stack] = buildStacks(files).stacks;
  if (stack === undefined) throw new Error('no stack');
  return stack;
}

const phase = (percent: number) => ({
  2134593: { tag: 0x00209241, vr: 'FL', value: percent } as const,
});
const soft = stackAt(0, { change: phase(75) });
const stateOf = (sharp: Stack, check: string): string | undefined =>
  headerEvidence(soft, sharp).evidence.find((one) => one.check === check)?.state;

describe('headerEvidence', () => {
  it('links two stacks of one frame of reference by position', () => {
    const sharp = stackAt(1, { series: `${CORPUS_ROOT}.2.2`, change: phase(75) });
    const got = headerEvidence(soft, sharp);
    expect([got.link, got.refusal]).toEqual(['position', undefined]);
    expect(got.evidence.map(({ check, state }) => `${check} ${state}`)).toEqual([
      'patient agrees',
      'study agrees',
      'frame of reference agrees',
      'acquisition unknown',
      'phase agrees',
      'orientation agrees',
      'overlap agrees',
      'slice spacing agrees',
      'thickness agrees',
      'pixel spacing agrees',
      'field of view agrees',
      'tilt agrees',
      'tube voltage unknown',
      'contrast agent unknown',
      'lossy compression agrees',
      'kernel label agrees',
    ]);
    expect(got.evidence[6]?.text).toBe(
      '1.0 mm of slices in common: along the normal 0.0 to 2.0 mm and 1.0 to 3.0 mm',
    );
  });

  it('refuses another phase, with both values', () => {
    expect(headerEvidence(soft, stackAt(0, { change: phase(40) })).refusal).toBe(
      'Not one acquisition: another phase: 75 % and 40 %',
    );
  });

  it('refuses another patient', () => {
    const other = stackAt(0, { change: { 1048608: { tag: 0x00100020, vr: 'LO', value: 'C-2' } } });
    expect(headerEvidence(soft, other).refusal).toMatch(/another patient/);
  });

  it('links by index where the frame of reference is another, or no slices are in common', () => {
    const frame = { 2097234: { tag: 0x00200052, vr: 'UI', value: '2.25.5' } as const };
    expect(headerEvidence(soft, stackAt(0, { change: { ...phase(75), ...frame } })).link).toBe(
      'index',
    );
    expect(headerEvidence(soft, stackAt(50, { change: phase(75) })).link).toBe('index');
    expect(stateOf(stackAt(50), 'overlap')).toBe('differs');
    expect(stateOf(stackAt(0), 'phase')).toBe('unknown');
  });

  it('links by position where neither stack states a frame of reference, which stays unknown', () => {
    const none = { 2097234: undefined };
    const got = headerEvidence(stackAt(0, { change: none }), stackAt(0, { change: none }));
    const frame = got.evidence.find(({ check }) => check === 'frame of reference');
    expect([got.link, frame?.state]).toEqual(['position', 'unknown']);
  });
});

describe('reasonNotToMeasure', () => {
  it('names another phase and positions that can’t be compared, and is silent on a pair', () => {
    const frame = { 2097234: { tag: 0x00200052, vr: 'UI', value: '2.25.5' } as const };
    const code = (sharp: Stack) => reasonNotToMeasure(headerEvidence(soft, sharp))?.code;
    expect(code(stackAt(0, { change: phase(40) }))).toBe('not-one-acquisition');
    expect(code(stackAt(0, { change: { ...phase(75), ...frame } }))).toBe(
      'positions-not-comparable',
    );
    expect(code(stackAt(0, { change: phase(75) }))).toBeUndefined();
  });
});
