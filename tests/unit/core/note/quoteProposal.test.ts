import { describe, expect, it } from 'vitest';
import {
  addEdge,
  changeEdgeQuote,
  changeRegion,
  edgeQuoteInForce,
  type Note,
  type NoteRegion,
  NoteSchema,
  quoteProposal,
  regionQuote,
  setFinding,
  withEdgeValues,
  withValues,
} from '../../../../core/note/index.js';
import {
  type EdgeValue,
  edgeNotMeasured,
  type Flag,
  type RegionValue,
} from '../../../../core/region/index.js';
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

  it('is neither where it is not known whether the sharp one’s blur keeps clear of an edge', () => {
    const note = flagged(['near-calcium'], ['edges-not-sought']);
    expect(lumenOf(note).quote).toBe('neither');
  });

  it('is the one kernel that was measured, and none where neither was, each with its reason', () => {
    const note = richNote();
    const lumen = lumenOf(note);
    const refused = (code: string): RegionValue | null =>
      lumen.soft && { ...lumen.soft, meanHu: null, flags: [flag(code)] };
    expect(quoteProposal(note, { ...lumen, sharp: null })).toEqual({
      quote: 'soft',
      reason: 'No value on the sharp kernel. The soft one is quoted.',
    });
    expect(quoteProposal(note, { ...lumen, soft: refused('slice-missing') })).toEqual({
      quote: 'sharp',
      reason: 'No value on the soft kernel: its slice could not be read. The sharp one is quoted.',
    });
    const noHu = { ...lumen, soft: refused('not-hu'), sharp: refused('not-hu') };
    expect(quoteProposal(note, noHu)).toEqual({
      quote: null,
      reason:
        'No value on the soft kernel: its pixels are not in HU. No value on the sharp kernel: its pixels are not in HU.',
    });
  });

  it('is not the only kernel that was measured when a strut or calcium disturbs it', () => {
    const note = richNote();
    const lumen = lumenOf(note);
    const near = (code: string) => lumen.sharp && { ...lumen.sharp, flags: [flag(code)] };
    const proposal = quoteProposal(note, { ...lumen, soft: null, sharp: near('near-strut') });
    expect(proposal.quote).toBe('neither');
    expect(proposal.reason).toContain('fitted stent');
    expect(
      quoteProposal(note, { ...lumen, soft: null, sharp: near('near-calcium') }),
    ).toMatchObject({ quote: 'neither' });
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
    expect(regionQuote(flaggedLater, region)).toMatchObject({
      by: 'reader',
      instead: { quote: 'neither' },
    });
  });
});

describe('The kernel to quote for an edge line', () => {
  const line = { fromMm: [0, 0, 1], toMm: [4, 0, 1], bandMm: 2 } as const;
  const rise = (riseMm: number | null): EdgeValue => ({
    ...edgeNotMeasured({ code: 'no-step', text: 'No clear step.' }),
    riseMm,
  });
  const quoteOf = (soft: number | null, sharp: number | null) => {
    const { note } = addEdge(richNote(), line, { soft: rise(soft), sharp: rise(sharp) }, NOW);
    return note.edges[0];
  };

  it('is the sharp one, the soft one where only that shows a rise, and none where neither does', () => {
    expect(quoteOf(1.2, 0.8)).toMatchObject({ quote: 'sharp', quoteBy: 'proposal' });
    expect(quoteOf(1.2, null)).toMatchObject({ quote: 'soft', quoteBy: 'proposal' });
    expect(quoteOf(null, null)).toMatchObject({ quote: null, quoteBy: 'proposal' });
  });

  it('is the reader’s where he chooses, whatever is measured later, until he gives it back', () => {
    const { note } = addEdge(richNote(), line, { soft: rise(1.2), sharp: rise(0.8) }, NOW);
    const change = { quote: 'soft', quoteReason: 'motion', quoteBy: 'reader' } as const;
    const chosen = changeEdgeQuote(note, 'E1', change, LATER);
    if (!chosen.ok) throw new Error(chosen.refusal.text);
    const again = withEdgeValues(
      chosen.value,
      () => ({ soft: rise(1.1), sharp: rise(0.7) }),
      LATER,
    );
    const [edge] = again.edges;
    if (edge === undefined) throw new Error('no edge');
    expect(edge).toMatchObject(change);
    expect(edgeQuoteInForce(edge).instead?.quote).toBe('sharp');
    const back = changeEdgeQuote(again, 'E1', { quoteBy: 'proposal' }, LATER);
    expect(back.ok && back.value.edges[0]).toMatchObject({ quote: 'sharp', quoteBy: 'proposal' });
    expect(changeEdgeQuote(note, 'E9', {}, LATER)).toMatchObject({
      refusal: { code: 'unknown-edge' },
    });
  });
});

it('A note of an earlier version keeps its quotes as the reader’s, and its edge lines have the proposal', () => {
  const { note } = addEdge(
    richNote(),
    { fromMm: [0, 0, 1], toMm: [4, 0, 1], bandMm: 2 },
    { soft: null, sharp: null },
    NOW,
  );
  const older = {
    ...note,
    regions: note.regions.map(({ quoteBy: _, ...region }) => region),
    edges: note.edges.map(({ quote: _q, quoteReason: _r, quoteBy: _b, ...edge }) => edge),
  };
  const read = NoteSchema.parse(older);
  expect(read.regions[0]).toMatchObject({
    quote: 'sharp',
    quoteReason: 'struts',
    quoteBy: 'reader',
  });
  expect(read.edges[0]).toMatchObject({ quote: null, quoteReason: '', quoteBy: 'proposal' });
});
