import { describe, expect, it } from 'vitest';
import type { NoteProfile, NoteStent } from '../../../../core/note/index.js';
import { noStentValue } from '../../../../core/note/index.js';
import type { ProfileValue, StentFit } from '../../../../core/stent/index.js';
import { ACROSS_MARGIN_PX, acrossScales, spanY } from '../../../../renderer/plots/acrossDrawing.js';
import { acrossProfile } from '../../../../renderer/plots/acrossProfile.js';
import { acrossStent } from '../../../../renderer/plots/acrossStent.js';
import { profileRows } from '../../../../renderer/plots/profileTableRows.js';

const VALUE: ProfileValue = {
  samples: { atMm: [0, 1, 2, 3, 4], hu: [-80, 700, 350, 720, -90] },
  kind: 'stent',
  struts: [
    { atMm: 1, peakHu: 700 },
    { atMm: 3, peakHu: 720 },
  ],
  halfHeightMm: [1.4, 2.6],
  visibleWidthMm: 1.2,
  lumenHu: 350,
  peakDistanceMm: 2,
  strutWidthMm: 0.9,
  riseMm: 0.6,
  narrowing: 0.6,
  sliceIndex: 2,
  sliceOffsetMm: 0,
  sopInstanceUid: '2.25.1',
  frameNumber: null,
  flags: [],
};
const { samples: _samples, ...KEPT } = VALUE;

const PROFILE: NoteProfile = {
  id: 'X1',
  label: 'Profile 1',
  fromMm: [0, 0, 0],
  toMm: [4, 0, 0],
  bandMm: 1,
  nominalMm: 3,
  definition: '',
  quote: 'sharp',
  quoteReason: '',
  quoteBy: 'proposal',
  soft: { ...KEPT, visibleWidthMm: null, flags: [{ code: 'x', text: 'Not told apart.' }] },
  sharp: KEPT,
};

describe('The picture of a profile', () => {
  const across = acrossProfile(PROFILE, { soft: undefined, sharp: VALUE });

  it('has a curve for each kernel that was sampled, with struts and half-height points', () => {
    expect(across.series.map(({ kernel }) => kernel)).toEqual(['sharp']);
    expect(across.series[0]?.measured[1]).toEqual({ mm: 1, hu: 700 });
    expect(across.series[0]?.marks).toEqual([
      { mm: 1, hu: 700, name: 'Strut' },
      { mm: 3, hu: 720, name: 'Strut' },
      { mm: 1.4, hu: 700, name: 'Half height' },
      { mm: 2.6, hu: 720, name: 'Half height' },
    ]);
  });

  it('has the nominal diameter around the middle of the lumen, and says all in words', () => {
    expect(across.spans).toEqual([{ fromMm: 0.5, toMm: 3.5, name: 'nominal 3.00 mm' }]);
    expect(across.summary).toBe(
      'Profile 1. Soft: no visible width. Sharp: visible width 1.20 mm, strut peaks 2.00 mm apart.',
    );
  });

  it('fits into its area, with room for the brackets', () => {
    const { x, y } = acrossScales(across, 300, 200);
    expect(x(0)).toBe(ACROSS_MARGIN_PX.left);
    expect(x(4)).toBe(290);
    expect(y(-90)).toBeLessThanOrEqual(200 - ACROSS_MARGIN_PX.bottom - 13);
    expect(spanY(0, 200)).toBe(166);
  });
});

describe('The numbers of a profile', () => {
  it('stand beside each other; what is missing says why', () => {
    const rows = profileRows(PROFILE);
    expect(rows[0]).toMatchObject({
      name: 'Visible width',
      soft: { text: '–', reason: 'Not told apart.' },
      sharp: { text: '1.20', reason: '' },
    });
    expect(rows.find(({ name }) => name === 'Narrowing')?.sharp.text).toBe('60');
  });
});

describe('The picture of a fitted stent', () => {
  const rings = { radiusMm: [0, 1, 2], measuredHu: [340, 600, -80], modelHu: [341, 598, -82] };
  const kernel = {
    profile: rings,
    model: { radiusMm: [0, 0.5, 1, 1.5, 2, 2.5], hu: [341, 400, 598, 300, -82, -85] },
    residual: {
      sliceIndex: 0,
      sopInstanceUid: '2.25.1',
      column: 0,
      row: 0,
      columns: 1,
      rows: 1,
      hu: new Float32Array(1),
    },
    noiseSdHu: 20,
  };
  const value = { value: 0, se: 0 };
  const fit: StentFit = {
    strutDiameterMm: { value: 3.1, se: 0.03 },
    lumenHu: { value: 345, se: 12 },
    centreMm: [0, 0, 0],
    axis: [0, 0, 1],
    tiltDeg: 2,
    wallWidthMm: value,
    wallHu: value,
    fatHu: value,
    strutMassHuMm: value,
    blurSigmaMm: value,
    refitted: null,
    kernels: [kernel, kernel],
    goodness: { chiSquare: 10, degreesOfFreedom: 10, worstSector: null, ringStandsOut: 20 },
    slicesMm: [0],
  };
  const reason = { code: 'no-ring', text: 'The images show no ring of struts here.' };
  const stent: NoteStent = {
    id: 'S1',
    label: 'Stent 1',
    findingId: null,
    centreMm: [0, 0, 0],
    nominalMm: 3,
    fit: {
      ...noStentValue(reason),
      reason: null,
      strutDiameterMm: fit.strutDiameterMm,
      lumenHu: fit.lumenHu,
    },
  };

  it('is mirrored around the axis, as far as the rings reach, with struts and nominal size', () => {
    const across = acrossStent(stent, fit);
    expect(across?.series.map(({ kernel: name }) => name)).toEqual(['soft', 'sharp']);
    expect(across?.series[0]?.measured.map(({ mm }) => mm)).toEqual([-2, -1, 0, 1, 2]);
    expect(across?.series[0]?.fitted.at(-1)).toEqual({ mm: 2, hu: -82 });
    expect(across?.uprightMm).toEqual([-1.55, 1.55]);
    expect(across?.spans.map(({ name }) => name)).toEqual(['struts 3.10 mm', 'nominal 3.00 mm']);
    expect(across?.summary).toContain('strut diameter 3.10 ± 0.03 mm, lumen 345 ± 12 HU');
  });

  it('is none where nothing was fitted', () => {
    expect(acrossStent(stent, { reason })).toBeUndefined();
  });
});
