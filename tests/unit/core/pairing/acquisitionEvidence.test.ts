import { describe, expect, it } from 'vitest';
import { acquisitionEvidence } from '../../../../core/pairing/acquisitionEvidence.js';
import { patientEvidence } from '../../../../core/pairing/patientEvidence.js';
import { stackOf } from './stackFixture.js';

const timed = (series: number, acquisitionTime: string, acquisitionNumber = 2) =>
  stackOf({
    series,
    acquisition: { acquisitionDate: '20260105', acquisitionTime, acquisitionNumber },
  });

describe('acquisitionEvidence', () => {
  it('is decided by the Acquisition UID where both state it', () => {
    const a = stackOf({ series: 1, acquisition: { acquisitionUid: '2.25.1' } });
    const b = stackOf({
      series: 2,
      acquisition: { acquisitionUid: '2.25.1', acquisitionNumber: 9 },
    });
    const c = stackOf({ series: 3, acquisition: { acquisitionUid: '2.25.3' } });
    expect(acquisitionEvidence(a, b).text).toBe('same acquisition: UID 2.25.1');
    expect(acquisitionEvidence(a, c).text).toBe('another acquisition: UID 2.25.1 and UID 2.25.3');
  });

  it('compares numbers and times, with both values', () => {
    expect(acquisitionEvidence(timed(1, '101500'), timed(2, '101500.4'))).toEqual({
      check: 'acquisition',
      state: 'agrees',
      text: 'same acquisition: number 2, 20260105 101500 and number 2, 20260105 101500.4',
    });
    expect(acquisitionEvidence(timed(1, '101500'), timed(2, '101800')).state).toBe('differs');
    expect(acquisitionEvidence(timed(1, '101500'), timed(2, '101500', 3)).text).toBe(
      'another acquisition: number 2, 20260105 101500 and number 3, 20260105 101500',
    );
  });

  it('compares times as spans, because slices are acquired one after the other', () => {
    const moving = (series: number, fromMm: number) =>
      stackOf({
        series,
        fromMm,
        acquisition: { acquisitionDate: '20260105' },
        slice: (index) => ({ acquisitionTime: `1015${String(10 + fromMm + index / 2)}` }),
      });
    expect(acquisitionEvidence(moving(1, 0), moving(2, 3)).state).toBe('agrees');
  });

  it('is unknown where neither number nor time is stated by both', () => {
    const silent = stackOf({ series: 1, acquisition: { acquisitionNumber: undefined } as never });
    expect(acquisitionEvidence(silent, stackOf({ series: 2 })).text).toBe(
      'acquisition: not stated and number 2',
    );
  });
});

describe('patientEvidence', () => {
  const of = (patientId?: string, patientName?: string) => ({
    studyInstanceUid: '1',
    ...(patientId !== undefined && { patientId }),
    ...(patientName !== undefined && { patientName }),
  });

  it('is another patient when identifier or name differs, and one when either agrees', () => {
    expect(patientEvidence(of('P1', 'A^B'), of('P2', 'A^B')).state).toBe('differs');
    expect(patientEvidence(of('P1', 'A^B'), of('P1', 'A^C')).state).toBe('differs');
    expect(patientEvidence(of('P1', 'A^B'), of('P1')).state).toBe('agrees');
    expect(patientEvidence(of('P1', 'A^B^^'), of('P1', 'A^B')).state).toBe('agrees');
  });

  it('is unknown where neither is stated by both', () => {
    expect(patientEvidence(of(), of('P1'))).toEqual({
      check: 'patient',
      state: 'unknown',
      text: 'patient: not stated and P1',
    });
  });
});
