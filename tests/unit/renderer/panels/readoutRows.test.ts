import { describe, expect, it } from 'vitest';
import type { RegionValue } from '../../../../core/region/index.js';
import {
  absenceReason,
  flagTexts,
  PLACEMENT_HELP,
  readoutRows,
  STANDARD_ERROR_HELP,
} from '../../../../renderer/panels/readoutRows.js';

const soft: RegionValue = {
  n: 1322,
  meanHu: 532.42,
  sdHu: 59.71,
  minHu: -12,
  maxHu: 688,
  medianHu: 530,
  areaMm2: 2.6,
  sampledAreaMm2: 2.59,
  snr: 8.917,
  sliceIndex: 20,
  sliceOffsetMm: 0,
  sopInstanceUid: '1.2',
  frameNumber: null,
  standardErrorHu: 1.26,
  placementHu: 4,
  flags: [],
};
const sharp: RegionValue = {
  ...soft,
  meanHu: 325.1,
  sdHu: 116,
  snr: 2.8,
  medianHu: 530.2,
  standardErrorHu: null,
};

describe('readoutRows', () => {
  it('sets both kernels beside each other with sharp minus soft', () => {
    expect(readoutRows(soft, sharp, 'HU')).toEqual([
      { name: 'mean HU', soft: '532.4', sharp: '325.1', delta: '−207.3' },
      { name: 'SD', soft: '59.7', sharp: '116.0' },
      { name: 'SNR', soft: '8.9', sharp: '2.8' },
      { name: 'band', soft: 'diagnostic', sharp: 'tolerable at best', aid: true },
      {
        name: 'standard error',
        soft: '± 1.3',
        sharp: '–',
        help: STANDARD_ERROR_HELP,
        absentFor: 'no-standard-error',
      },
      {
        name: 'placement',
        soft: '± 4.0',
        sharp: '± 4.0',
        help: PLACEMENT_HELP,
        absentFor: 'no-placement',
      },
      { name: 'median', soft: '530.0', sharp: '530.2', delta: '+0.2' },
      { name: 'range', soft: '−12…688', sharp: '−12…688' },
      { name: 'pixels · 2.6 mm²', soft: '1\u2009322', sharp: '1\u2009322' },
    ]);
  });
  it('shows a dash and no difference where a kernel has no value', () => {
    const [mean, sd, snr, band] = readoutRows({ ...soft, snr: null, sdHu: null }, null, 'HU');
    expect(mean).toEqual({ name: 'mean HU', soft: '532.4', sharp: '–' });
    expect([sd?.soft, snr?.soft, band?.soft]).toEqual(['–', '–', '–']);
  });
});

describe('absenceReason', () => {
  const [mean, , , , error] = readoutRows(soft, sharp, 'HU');
  const few = { code: 'no-standard-error', text: 'No standard error: too few areas.' };
  const lossy = { code: 'lossy', text: 'Lossy.' };
  it('of a standard error is its own reason and not what else is said of the value', () => {
    expect(error && absenceReason(error, { ...soft, flags: [lossy, few] })).toBe(few.text);
  });
  it('of another number leaves out why there is no standard error', () => {
    expect(mean && absenceReason(mean, { ...soft, flags: [lossy, few] })).toBe('Lossy.');
    expect(mean && absenceReason(mean, null)).toBe('This stack has no value here.');
  });
});

describe('flagTexts', () => {
  const near = { code: 'near-edge', text: 'Near an edge.' };
  const lossy = { code: 'lossy', text: 'Lossy.' };
  const quiet = { code: 'no-standard-error', text: 'No standard error.' };
  it('says once what holds for both, and names the kernel of what holds for one', () => {
    expect(
      flagTexts({ ...soft, flags: [near, quiet] }, { ...sharp, flags: [lossy, near, quiet] }),
    ).toEqual(['Near an edge.', 'sharp: Lossy.']);
  });
  it('is empty without values', () => {
    expect(flagTexts(null, null)).toEqual([]);
  });
});
