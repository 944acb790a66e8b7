import { describe, expect, it } from 'vitest';
import type { RegionValue } from '../../../../core/region/index.js';
import { flagTexts, readoutRows } from '../../../../renderer/panels/readoutRows.js';

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
  standardErrorHu: null,
  placementHu: 4,
  flags: [],
};
const sharp: RegionValue = { ...soft, meanHu: 325.1, sdHu: 116, snr: 2.8, medianHu: 530.2 };

describe('readoutRows', () => {
  it('sets both kernels beside each other with sharp minus soft', () => {
    expect(readoutRows(soft, sharp, 'HU')).toEqual([
      { name: 'mean HU', soft: '532.4', sharp: '325.1', delta: '−207.3' },
      { name: 'SD', soft: '59.7', sharp: '116.0' },
      { name: 'SNR', soft: '8.9', sharp: '2.8' },
      { name: 'band', soft: 'diagnostic', sharp: 'tolerable at best', aid: true },
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
