import { describe, expect, it } from 'vitest';
import type { NoteContrast, NoteFinding, NoteRegion } from '../../../../core/note/index.js';
import { contrastsOf, groupTitle, ledgerGroups } from '../../../../renderer/panels/ledgerGroups.js';

const finding = (id: string, segment: number | null, kind: NoteFinding['kind']): NoteFinding => ({
  id,
  segment,
  kind,
  nominalMm: null,
  lengthMm: null,
  overlap: null,
  location: '',
  assessability: null,
  reason: '',
});
const region = (id: string, label: string, findingId: string | null): NoteRegion => ({
  id,
  role: 'lumen',
  label,
  place: '',
  findingId,
  shape: { kind: 'ellipse', centreMm: [0, 0, 0], radiiMm: [1, 1] },
  quote: null,
  quoteReason: '',
  quoteBy: 'proposal',
  soft: null,
  sharp: null,
});
const contrast = (id: string, noise: NoteContrast['noise']): NoteContrast => ({
  id,
  lumen: 'L1',
  wall: 'W1',
  noise,
  reference: 'R1',
  formula: '',
  soft: 1,
  sharp: 2,
  flags: [],
});

describe('ledgerGroups', () => {
  it('puts references first, then segments in order, findings without one after them, loose regions last', () => {
    const groups = ledgerGroups({
      findings: [
        finding('D1', 11, 'stent'),
        finding('D2', null, 'stent'),
        finding('D3', 7, 'native lumen'),
        finding('D4', null, 'reference'),
      ],
      regions: ['D1', null, 'D2', 'D3', 'D4'].map((id, i) => region(`L${i}`, '', id)),
    });
    expect(groups.map((group) => group.finding?.id)).toEqual(['D4', 'D3', 'D1', 'D2', undefined]);
  });
  it('keeps the order of making inside a group and leaves empty findings out', () => {
    const groups = ledgerGroups({
      findings: [finding('D1', 7, 'stent'), finding('D2', 8, 'stent')],
      regions: [region('L2', '', 'D1'), region('L1', '', 'D1')],
    });
    expect(groups.map((group) => group.regions.map(({ id }) => id))).toEqual([['L2', 'L1']]);
  });
  it('loses no region whose finding is not in the note', () => {
    const groups = ledgerGroups({ findings: [], regions: [region('L1', '', 'gone')] });
    expect(groups).toHaveLength(1);
    expect(groups[0]?.finding).toBeUndefined();
  });
});

describe('groupTitle', () => {
  it('names segment and kind', () => {
    expect(groupTitle(finding('D1', 7, 'stent'))).toBe(
      '7 mLAD · Mid left anterior descending artery · stent',
    );
    expect(groupTitle(finding('D1', null, 'reference'))).toBe('Reference');
    expect(groupTitle(undefined)).toBe('Not assigned to a finding yet');
  });
});

describe('contrasts of the ledger', () => {
  it('finds those in which a region is the lumen', () => {
    const all = [contrast('C1', 'reference'), { ...contrast('C2', 'wall'), lumen: 'L9' }];
    expect(contrastsOf(all, 'L1').map(({ id }) => id)).toEqual(['C1']);
  });
});
