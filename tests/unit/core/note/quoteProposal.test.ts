import { describe, expect, it } from 'vitest';
import {
  changeRegion,
  type Note,
  type NoteRegion,
  quoteInForce,
  quoteProposal,
  setFinding,
  withValues,
} from '../../../../core/note/index.js';
import type { Flag, RegionValue } from '../../../../core/region/index.js';
import { LATER, NOW } from './noteFixture.js';
import { richNote } from './richNote.js';

const flag = (code: string): Flag => ({ code, text: code });

function lumenOf(note: Note): NoteRegion {
  const region = note.regions.find(({ id }) => id === 'L1');
  if (region === undefined) throw new Error('no lumen');
  return region;
}

/** The rich note's lumen in a stent, with flags on each kernel. */
function flagged(soft: readonly string[], sharp: readonly string[]): Note {
  const note = richNote();
  const withFlags = (value: RegionValue | null, codes: readonly string[]) =>
    value && { ...value, flags: codes.map(flag) };
  return withValues(
    { ...note, regions: note.regions.map((region) => ({ ...region, quoteBy: 'proposal' })) },
    (region) => ({
      soft: withFlags(region.soft, region.id === 'L1' ? soft : []),
      sharp: withFlags(region.sharp, region.id === 'L1' ? sharp : []),
    }),
    LATER,
  );
}

describe('Which kernel to quote', () => {
  it('is the soft one for a density that nothing disturbs', () => {
    const region = lumenOf(flagged([], []));
    expect([region.quote, region.quoteBy]).toEqual(['soft', 'proposal']);
    expect(region.quoteReason).toContain('Density');
  });

  it('is neither for a mean in a stent that a strut disturbs: the fitted stent is', () => {
    const region = lumenOf(flagged(['near-strut'], []));
    expect(region.quote).toBe('neither');
    expect(region.quoteReason).toContain('fitted stent');
  });

  it('is the sharp one where only the soft one’s blur reaches calcium or air, and neither where both do', () => {
    const native = (soft: readonly string[], sharp: readonly string[]) => {
      const moved = setFinding(flagged(soft, sharp), 'L1', { kind: 'native lumen' }, NOW);
      if (!moved.ok) throw new Error(moved.refusal.text);
      return lumenOf(moved.value).quote;
    };
    expect(native(['near-calcium'], [])).toBe('sharp');
    expect(native(['near-air'], ['near-air'])).toBe('neither');
    expect(native(['few-pixels'], [])).toBe('soft');
  });

  it('is the one kernel that was measured, and none where neither was', () => {
    const note = richNote();
    const lumen = lumenOf(note);
    expect(quoteProposal(note, { ...lumen, sharp: null }).quote).toBe('soft');
    expect(quoteProposal(note, { ...lumen, soft: null }).quote).toBe('sharp');
    expect(quoteProposal(note, { ...lumen, soft: null, sharp: null }).quote).toBeNull();
  });

  it('follows new flags while it is proposed, and never changes what the reader chose', () => {
    const chosen = changeRegion(
      flagged([], []),
      'L1',
      { quote: 'both', quoteReason: 'shown in conference', quoteBy: 'reader' },
      NOW,
    );
    if (!chosen.ok) throw new Error(chosen.refusal.text);
    const flaggedLater = withValues(
      chosen.value.note,
      ({ soft, sharp }) => ({ soft: soft && { ...soft, flags: [flag('near-strut')] }, sharp }),
      LATER,
    );
    const region = lumenOf(flaggedLater);
    expect([region.quote, region.quoteReason]).toEqual(['both', 'shown in conference']);
    expect(quoteInForce(flaggedLater, region)).toMatchObject({
      by: 'reader',
      instead: { quote: 'neither' },
    });
  });
});
