import { describe, expect, it } from 'vitest';
import type { Note, NoteFinding } from '../../../../../core/note/index.js';
import { completeness } from '../../../../../core/note/life/index.js';
import { richNote } from '../richNote.js';

const codes = (note: Note): readonly string[] => completeness(note).map(({ code }) => code);

function withFinding(change: Partial<NoteFinding>): Note {
  const note = richNote();
  return { ...note, findings: note.findings.map((finding) => ({ ...finding, ...change })) };
}

const WHOLE: Partial<NoteFinding> = {
  kind: 'stent',
  segment: 7,
  nominalMm: 3,
  lengthMm: 18,
  overlap: false,
  assessability: 'limited',
  reason: 'struts bloom',
};

describe('The list of what is missing', () => {
  it('asks a stent for its nominal diameter and length, and whether it overlaps', () => {
    const bare = codes(withFinding({ ...WHOLE, nominalMm: null, lengthMm: null, overlap: null }));
    expect(bare).toEqual(expect.arrayContaining(['nominal', 'length', 'overlap']));
    const whole = codes(withFinding(WHOLE));
    expect(whole).not.toEqual(expect.arrayContaining(['nominal']));
    expect(whole).not.toEqual(expect.arrayContaining(['length']));
    expect(whole).not.toEqual(expect.arrayContaining(['overlap']));
  });

  it('asks a native lumen for none of these', () => {
    const missing = codes(withFinding({ ...WHOLE, kind: 'native lumen', nominalMm: null }));
    expect(missing.filter((code) => ['nominal', 'length', 'overlap'].includes(code))).toEqual([]);
  });

  it('asks why something can’t be assessed, and not why it can', () => {
    expect(codes(withFinding({ ...WHOLE, reason: '' }))).toContain('reason');
    const fine = codes(withFinding({ ...WHOLE, assessability: 'assessable', reason: '' }));
    expect(fine).not.toContain('reason');
    expect(codes(withFinding({ ...WHOLE, assessability: null }))).toContain('assessability');
  });

  it('asks for the segment, and says when it is one that the heart is said not to have', () => {
    expect(codes(withFinding({ ...WHOLE, segment: null }))).toContain('segment');
    const note = withFinding(WHOLE);
    expect(codes({ ...note, anatomy: { dominance: 'right', absentSegments: [7] } })).toContain(
      'absent-segment',
    );
  });

  it('asks for conditions that the files do not state', () => {
    const note = withFinding(WHOLE);
    const silent = { ...note.conditions, kvp: null, phasePercent: null, contrastAgent: null };
    expect(codes({ ...note, conditions: silent })).toEqual(
      expect.arrayContaining(['kvp', 'phase', 'contrast-agent']),
    );
  });

  it('names the finding in each sentence that is about one', () => {
    const [first] = completeness(withFinding({ ...WHOLE, nominalMm: null })).filter(
      ({ code }) => code === 'nominal',
    );
    expect(first?.text).toBe('Stent in mLAD: the nominal diameter.');
    expect(first?.findingId).toMatch(/^D\d+$/);
  });

  it('says that nothing is measured in a note without regions', () => {
    expect(codes({ ...richNote(), regions: [], contrasts: [], findings: [] })).toContain('regions');
  });
});
