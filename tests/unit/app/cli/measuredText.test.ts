import { describe, expect, it } from 'vitest';
import { measuredText } from '../../../../app/cli/measuredText.js';
import type { MeasuredPlan } from '../../../../core/note/index.js';
import { linesNote, STENT_FIT } from '../../core/report/linesNote.js';

const EMPTY: MeasuredPlan = { regions: [], contrasts: [], profiles: [], stents: [] };

describe('The measured plan for people', () => {
  it('has fitted stents in a table and in a sentence, with their caution', () => {
    const { reason: _, ...values } = STENT_FIT;
    const lines = measuredText({ ...EMPTY, stents: [{ id: 'S1', ...values }] }).split('\n');
    expect(lines[0]).toMatch(/^Stent +Strut diameter mm +Lumen HU +Wall mm/);
    expect(lines[1]?.split(/ {2,}/)).toEqual([
      'S1',
      '3.11 ± 0.03',
      '345 ± 12',
      '0.63 ± 0.05',
      '62 ± 18',
      '413 ± 21',
      '0.35 ± 0.01',
      '118.4',
      '104',
      '1.3',
      '7',
    ]);
    const said = lines.slice(2).join(' ');
    expect(said).toContain('S1: Fitted: strut diameter 3.11 ± 0.03 mm, lumen 345 ± 12 HU');
    expect(said).toContain('synthetic phantoms only');
  });

  it('has the reason alone where no stent could be fitted', () => {
    const { reason: _, ...values } = STENT_FIT;
    const without = { id: 'S2', ...values, strutDiameterMm: null, lumenHu: null };
    const text = measuredText({ ...EMPTY, stents: [{ ...without, reason: 'Not round.' }] });
    expect(text).toBe('S2: No fitted stent: Not round.\n');
  });

  it('says how a plane was cut and from which slices, or that it could not be', () => {
    const [plane] = linesNote().planes;
    if (plane === undefined) throw new Error('no plane');
    const planes = [
      { id: 'O1', facts: plane },
      { id: 'O2', facts: null },
    ];
    expect(measuredText({ ...EMPTY, planes })).toBe(
      'O1: oblique plane, resampled by cubic convolution, mean over 1.5 mm, 45.0° to the slices; soft slices 1 to 4; sharp slices 1 to 4.\nO2: the oblique plane could not be cut.\n',
    );
  });
});
