import { describe, expect, it } from 'vitest';
import {
  addProfile,
  changeProfile,
  changeProfileQuote,
  type Note,
  NoteSchema,
  PROFILE_DEFINITION,
  profileQuote,
  profileQuoteInForce,
  removeProfile,
  withProfileValues,
  withProposedQuotes,
} from '../../../../core/note/index.js';
import { sampleNote } from '../../app/host/sampleNote.js';
import { PROFILE_VALUE } from '../report/linesNote.js';

const NOW = '2026-01-12T08:00:00Z';
const LINE = { fromMm: [-8, -15, 2], toMm: [-4, -15, 2], bandMm: 1, nominalMm: 3 } as const;
const NONE = { soft: null, sharp: null };
const BOTH = { soft: PROFILE_VALUE, sharp: { ...PROFILE_VALUE, visibleWidthMm: 2.4621 } };

function added(): Note {
  return addProfile(sampleNote(), LINE, BOTH, NOW).note;
}

describe('Profiles of a note', () => {
  it('are added with name, definition and the proposed quote', () => {
    const { note, profile } = addProfile(sampleNote(), { ...LINE, plane: 'O1' }, BOTH, NOW);
    expect(profile).toEqual({
      id: 'X1',
      label: 'Profile 1',
      ...LINE,
      plane: 'O1',
      definition: PROFILE_DEFINITION,
      quote: 'sharp',
      quoteReason: 'Edges and widths: the sharp kernel blurs less.',
      quoteBy: 'proposal',
      ...BOTH,
    });
    expect(note.profiles).toEqual([profile]);
    expect(note.changedAt).toBe(NOW);
    expect(NoteSchema.parse(JSON.parse(JSON.stringify(note)))).toEqual(note);
  });

  it('have neither nominal diameter nor cut where none is said', () => {
    const { nominalMm: _, ...bare } = LINE;
    const { profile } = addProfile(sampleNote(), bare, NONE, NOW);
    expect(profile).not.toHaveProperty('nominalMm');
    expect(profile).not.toHaveProperty('plane');
    expect(profile.quoteReason).toBe('No visible width on either kernel.');
  });

  it('are numbered, and a number is not used again after a removal', () => {
    const gone = removeProfile(added(), 'X1', NOW);
    expect(gone.profiles).toEqual([]);
    expect(addProfile(gone, LINE, NONE, NOW).profile.id).toBe('X2');
    expect(removeProfile(gone, 'X1', NOW)).toBe(gone);
  });

  it('change place, nominal diameter and values together, keeping name, cut and the reader’s quote', () => {
    const { note } = addProfile(sampleNote(), { ...LINE, plane: 'O1' }, BOTH, NOW);
    const chosen = changeProfileQuote(
      note,
      'X1',
      { quote: 'soft', quoteReason: 'calmer', quoteBy: 'reader' },
      NOW,
    );
    if (!chosen.ok) throw new Error(chosen.refusal.text);
    const { nominalMm: _, ...bare } = LINE;
    const moved = changeProfile(chosen.value, 'X1', { ...bare, bandMm: 2 }, NONE, NOW);
    if (!moved.ok) throw new Error(moved.refusal.text);
    expect(moved.value.profile).toEqual({
      id: 'X1',
      label: 'Profile 1',
      ...bare,
      bandMm: 2,
      plane: 'O1',
      definition: PROFILE_DEFINITION,
      quote: 'soft',
      quoteReason: 'calmer',
      quoteBy: 'reader',
      ...NONE,
    });
  });

  it('that are unknown can’t be changed', () => {
    expect(changeProfile(added(), 'X9', LINE, NONE, NOW)).toMatchObject({
      refusal: { code: 'unknown-profile' },
    });
    expect(changeProfileQuote(added(), 'X9', { quote: 'soft' }, NOW)).toMatchObject({
      refusal: { code: 'unknown-profile' },
    });
  });

  it('keep what they had on a kernel that can’t be measured now, and then stay the same note', () => {
    const note = added();
    expect(withProfileValues(note, () => NONE, NOW)).toBe(note);
    const sharp = { ...PROFILE_VALUE, visibleWidthMm: 2.5 };
    const [profile] = withProfileValues(note, () => ({ soft: null, sharp }), NOW).profiles;
    expect(profile).toMatchObject({ soft: BOTH.soft, sharp });
  });

  it('are quoted on the sharp kernel where it has a width, else on the soft one', () => {
    const without = { ...PROFILE_VALUE, visibleWidthMm: null };
    expect(profileQuote(BOTH).quote).toBe('sharp');
    expect(profileQuote({ soft: PROFILE_VALUE, sharp: without })).toEqual({
      quote: 'soft',
      reason: 'No visible width on the sharp kernel. The soft one is quoted.',
    });
    expect(profileQuote({ soft: without, sharp: null }).quote).toBeNull();
  });

  it('follow the proposal until the reader chooses, and tell then what it would be', () => {
    const note = added();
    const [profile] = note.profiles;
    if (profile === undefined) throw new Error('no profile');
    const lost = { ...note, profiles: [{ ...profile, sharp: null }] };
    expect(withProposedQuotes(lost).profiles[0]).toMatchObject({
      quote: 'soft',
      quoteReason: 'No visible width on the sharp kernel. The soft one is quoted.',
    });
    expect(withProposedQuotes(note).profiles).toBe(note.profiles);
    const chosen = { ...profile, quote: 'soft', quoteReason: '', quoteBy: 'reader' } as const;
    expect(withProposedQuotes({ ...lost, profiles: [chosen] }).profiles).toEqual([chosen]);
    expect(profileQuoteInForce(chosen)).toEqual({
      quote: 'soft',
      reason: '',
      by: 'reader',
      instead: { quote: 'sharp', reason: 'Edges and widths: the sharp kernel blurs less.' },
    });
  });

  it('are absent in an older note', () => {
    const { profiles: _, ...older } = sampleNote();
    expect(NoteSchema.parse(older).profiles).toEqual([]);
  });
});
