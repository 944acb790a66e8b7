import { describe, expect, it } from 'vitest';
import type { Evidence } from '../../../../core/note/index.js';
import { headerVerdict, verdictOf } from '../../../../renderer/views/verdict.js';
import { sampleState } from '../sample.js';

const says = (check: string, state: Evidence['state']): Evidence => ({
  check,
  state,
  text: `${check}: ${state}`,
});

describe('The verdict on a pair', () => {
  it('is a pair when all agrees, whatever the kernels’ labels', () => {
    expect(
      headerVerdict([says('patient', 'agrees'), says('kernel label', 'differs')], undefined),
    ).toBe('pair');
  });

  it('has reservations when something differs, or when the patient is not stated', () => {
    expect(headerVerdict([says('thickness', 'differs')], undefined)).toBe('reservations');
    expect(headerVerdict([says('patient', 'unknown')], undefined)).toBe('reservations');
    expect(headerVerdict([says('tube voltage', 'unknown')], undefined)).toBe('pair');
  });

  it('is refused where the headers refuse it', () => {
    expect(headerVerdict([], 'Not one acquisition')).toBe('refused');
  });

  it('warns for as long as the plates are linked by number', () => {
    const { pair } = sampleState({ link: 'index' });
    expect(verdictOf(pair).lines[0]).toBe('Linked by slice number: positions can’t be compared.');
  });
});
