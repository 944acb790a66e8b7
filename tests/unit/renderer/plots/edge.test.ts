import { describe, expect, it } from 'vitest';
import { edgeNotMeasured } from '../../../../core/region/index.js';
import {
  edgeDrawing,
  edgeSummary,
  profileDrawing,
} from '../../../../renderer/plots/edgeDrawing.js';
import { edgeRows, textureRows } from '../../../../renderer/plots/noiseTableRows.js';

const EDGE = {
  fromHu: 0,
  toHu: 400,
  atMm: 5,
  angleDeg: 3,
  riseMm: 2,
  riseErrorMm: 0.1,
  crossingsMm: 2.02,
  residualHu: 8,
  profile: [-3, -1, 0, 1, 3].map((mm) => ({ mm, hu: 200 + 60 * mm, n: 9, squaresHu2: 0 })),
};

const TEXTURE = {
  noiseSdHu: 10.24,
  areas: 12,
  frequencyPerMm: [0.1],
  powerHu2Mm2: [90],
  meanPerMm: 0.253,
  peakPerMm: 0.18,
  riseMm: 1.68,
  blurFwhmMm: 1.543,
};

describe('The picture of an edge', () => {
  it('marks 10 and 90 % of the step half a rise distance before and behind the edge', () => {
    const drawing = edgeDrawing([EDGE], 300, 150);
    const { marks, dots, curve } = profileDrawing(EDGE, drawing);
    expect(marks.map(({ percent, x }) => [percent, drawing.x.invert(x)])).toEqual([
      [10, expect.closeTo(-1, 9)],
      [90, expect.closeTo(1, 9)],
    ]);
    // Φ(∓1.2815516) is 0.1 and 0.9: tables of the normal distribution.
    expect(marks.map(({ y }) => drawing.y.invert(y))).toEqual([
      expect.closeTo(40, 3),
      expect.closeTo(360, 3),
    ]);
    expect(dots).toHaveLength(5);
    expect(curve.startsWith('M')).toBe(true);
  });

  it('says its numbers in words, and where a kernel has no edge', () => {
    expect(edgeSummary('Edge 1', EDGE, undefined)).toBe(
      'Profile across Edge 1. Soft: from 0 to 400 HU, 10 to 90 % over 2.00 mm. Sharp: no edge.',
    );
  });
});

describe('The table of noise and sharpness', () => {
  const row = (rows: ReturnType<typeof textureRows>, name: string) =>
    rows.find((one) => one.name === name);

  it('has both kernels beside each other, and the reason where there is no value', () => {
    const rows = textureRows({ soft: TEXTURE, sharp: { ...TEXTURE, riseMm: null } }, undefined);
    expect(rows.map(({ name, unit, soft }) => [name, unit, soft.text])).toEqual([
      ['Noise SD', 'HU', '10.2'],
      ['Mean frequency', '/mm', '0.25'],
      ['Peak frequency', '/mm', '0.18'],
      ['Edge rise 10–90 %', 'mm', '1.68'],
      ['Blur FWHM', 'mm', '1.54'],
    ]);
    expect(row(rows, 'Edge rise 10–90 %')?.sharp).toEqual({
      text: '–',
      reason: 'Both stacks show no clean edges in common. Draw an edge line.',
    });
  });

  it('begins with the SD of the area that was chosen', () => {
    const area = {
      number: 3,
      centreMm: [0, 0, 0],
      slice: 2,
      softSdHu: 9.5,
      sharpSdHu: undefined,
    } as const;
    expect(textureRows({ soft: TEXTURE, sharp: undefined }, area)[0]).toMatchObject({
      name: 'SD of area 3',
      soft: { text: '9.5', reason: '' },
      sharp: { text: '–', reason: 'Not measured: too few uniform areas in both stacks.' },
    });
  });

  it('gives an edge line’s values with their errors, and the reason of the kernel that has none', () => {
    const soft = {
      ...edgeNotMeasured({ code: '', text: '' }),
      riseMm: 2.02,
      riseErrorMm: 0.191,
      blurFwhmMm: 1.86,
      blurErrorMm: 0.18,
      fromHu: 90,
      toHu: 60.5,
      flags: [],
    };
    const sharp = edgeNotMeasured({ code: 'no-step', text: 'No clear step.' });
    const rows = edgeRows({ soft, sharp });
    expect(rows.map(({ soft: cell }) => cell.text)).toEqual([
      '2.02 ± 0.19',
      '1.86 ± 0.18',
      '–',
      '−29.5',
    ]);
    expect(row(rows, 'Crossings')?.soft.reason).toBe(
      'Noise hides where the profile crosses 10 and 90 %.',
    );
    expect(row(rows, 'Blur FWHM')?.sharp).toEqual({ text: '–', reason: 'No clear step.' });
  });
});
