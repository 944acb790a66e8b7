import { describe, expect, it } from 'vitest';
import type { KernelTexture } from '../../../../core/quality/index.js';
import { parseContrast } from '../../../../renderer/plots/parseContrast.js';
import {
  heldInside,
  visibleCurves,
  visibleDrawing,
} from '../../../../renderer/plots/visibleDrawing.js';
import { visibleReason } from '../../../../renderer/plots/visibleReason.js';
import {
  placeSentences,
  visibleCaution,
  visibleSentence,
} from '../../../../renderer/plots/visibleWords.js';

/** White noise without blur: a disc of diameter D is seen from 2k·√(NPS/π)/D (Rose 1948). */
const white: KernelTexture = {
  noiseSdHu: 25,
  areas: 8,
  frequencyPerMm: [0.08, 0.4, 0.8, 1.25],
  powerHu2Mm2: [100, 100, 100, 100],
  meanPerMm: 0.6,
  peakPerMm: 0.4,
  riseMm: 0,
  blurFwhmMm: 0,
};
const blurless: KernelTexture = { ...white, riseMm: null, blurFwhmMm: null };

describe('The curves of what could be seen', () => {
  it('fall from small discs of much contrast to large ones of little', () => {
    const [soft, sharp] = visibleCurves({ soft: white, sharp: null }, 5);
    expect(sharp?.points).toEqual([]);
    expect(soft?.points).toHaveLength(49);
    const [first, last] = [soft?.points[0], soft?.points.at(-1)];
    // By hand: 2·5·√(100/π)/0.2 = 282.1 HU and /12 = 4.70 HU.
    expect(first?.diameterMm).toBeCloseTo(0.2, 10);
    expect(first?.contrastHu).toBeCloseTo(282.09, 1);
    expect(last?.diameterMm).toBeCloseTo(12, 10);
    expect(last?.contrastHu).toBeCloseTo(4.7, 1);
  });

  it('are drawn on two logarithmic axes and end at the frame', () => {
    const { x, y, lines } = visibleDrawing(
      visibleCurves({ soft: white, sharp: null }, 5),
      300,
      200,
    );
    expect(x(0.4)).toBe(40);
    expect(x(12)).toBe(286);
    expect(y(5)).toBe(180);
    expect(y(1000)).toBe(18);
    expect(lines.sharp).toBe('');
    const xs = [...lines.soft.matchAll(/[ML]([\d.]+),/g)].map((match) => Number(match[1]));
    expect(Math.min(...xs)).toBeGreaterThanOrEqual(40);
    expect(Math.max(...xs)).toBeLessThanOrEqual(286);
  });

  it('keep a region beyond the frame at its edge', () => {
    const drawing = visibleDrawing([], 300, 200);
    expect(heldInside(drawing, 40, 3000)).toEqual([286, 18]);
  });
});

describe('The sentences of what could be seen', () => {
  it('say from which diameter', () => {
    // 2·5·√(100/π)/60 = 0.940 mm.
    expect(visibleSentence({ kernel: 'sharp', texture: white, contrastHu: 60, k: 5 })).toBe(
      'On the sharp kernel a filling defect of 60 HU is visible from 0.9 mm.',
    );
  });

  it('say why where it can’t be told', () => {
    const say = (texture: KernelTexture | null, contrastHu: number | undefined): string =>
      visibleSentence({ kernel: 'soft', texture, contrastHu, k: 5 });
    expect(say(null, 60)).toBe('On the soft kernel the noise could not be measured.');
    expect(say(white, undefined)).toBe('On the soft kernel this contrast is not measured.');
    expect(say(blurless, 60)).toBe(
      'On the soft kernel: the blur could not be measured: too few clean edges on both stacks.',
    );
    expect(say(white, 2)).toBe(
      'On the soft kernel a filling defect of 2 HU: no disc of up to 12 mm is seen.',
    );
    expect(say(white, 900)).toBe(
      'On the soft kernel a filling defect of 900 HU: even a disc of 0.2 mm is seen.',
    );
  });

  it('caution, and more where the contrast is below what an eye tells apart', () => {
    expect(visibleCaution([60, 70])).toBe('An ideal observer’s figure, no promise.');
    expect(visibleCaution([60, 15])).toBe(
      'An ideal observer’s figure, no promise. Below 20 HU an eye tells nothing apart.',
    );
  });

  it('tell where the region lies', () => {
    const own = {
      label: 'Lumen 1',
      points: [{ kernel: 'soft', diameterMm: 2, contrastHu: 443.4 }],
    } as const;
    // 2·5·√(100/π)/2 = 28.2 HU.
    expect(placeSentences(own, () => white, 5)).toBe(
      'Lumen 1, 2.0 mm, soft kernel: needs 28 HU and has 443 HU.',
    );
    expect(placeSentences(own, () => null, 5)).toBe('Lumen 1, 2.0 mm, soft kernel: has 443 HU.');
  });
});

describe('The reason why nothing can be said of visibility', () => {
  const pair = { sharp: {} } as Parameters<typeof visibleReason>[0];
  const done = { kind: 'done' } as Parameters<typeof visibleReason>[1];

  it('is none where one kernel has noise and blur', () => {
    expect(visibleReason(pair, done, { soft: blurless, sharp: white })).toBeUndefined();
  });

  it('names what is missing', () => {
    expect(visibleReason(undefined, done, undefined)).toContain('Open a study');
    expect(visibleReason({ ...pair, sharp: undefined } as never, done, undefined)).toContain(
      'Choose a pair',
    );
    expect(visibleReason(pair, { kind: 'none' }, undefined)).toContain('being measured');
    expect(visibleReason(pair, { kind: 'failed', text: 'No.' }, undefined)).toBe('No.');
    expect(visibleReason(pair, done, { soft: null, sharp: null })).toContain('uniform areas');
    expect(visibleReason(pair, done, { soft: blurless, sharp: null })).toContain('clean edges');
  });
});

describe('A typed contrast', () => {
  it('is a number of HU with a point or a comma, whichever way it goes', () => {
    expect(parseContrast('60')).toBe(60);
    expect(parseContrast(' −72,5 HU')).toBe(72.5);
    expect(parseContrast('0')).toBeUndefined();
    expect(parseContrast('1e3')).toBeUndefined();
    expect(parseContrast('sixty')).toBeUndefined();
  });
});
