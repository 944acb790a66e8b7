import type { NoteProfile, NoteProfileValue } from '../../note/profileSchema.js';
import { profileQuote } from '../../note/quoteProposal.js';
import { type Cleaner, cleanFlag, cleanPlaneReference, cleanUid, safeLabel } from './cleaner.js';

/** A profile without identity: its place and numbers stay, its name is made anew, its images get new UIDs. */
export function cleanProfile(profile: NoteProfile, cleaner: Cleaner): NoteProfile {
  const { fromMm, toMm, bandMm, nominalMm, quote, quoteBy } = profile;
  const id = cleaner.ids.idOf(profile.id);
  return {
    id,
    label: safeLabel('Profile', id),
    fromMm,
    toMm,
    bandMm,
    ...(nominalMm === undefined ? {} : { nominalMm }),
    ...cleanPlaneReference(profile, cleaner),
    definition: cleaner.sentence(profile.definition),
    quote,
    // As of regions: a reason of the program is made anew, one of the reader goes.
    quoteReason: quoteBy === 'proposal' ? profileQuote(profile).reason : '',
    quoteBy,
    soft: cleanValue(profile.soft, cleaner),
    sharp: cleanValue(profile.sharp, cleaner),
  };
}

function cleanValue(of: NoteProfileValue | null, cleaner: Cleaner): NoteProfileValue | null {
  if (of === null) return null;
  return {
    kind: of.kind,
    struts: of.struts.map(({ atMm, peakHu }) => ({ atMm, peakHu })),
    halfHeightMm: of.halfHeightMm,
    visibleWidthMm: of.visibleWidthMm,
    lumenHu: of.lumenHu,
    peakDistanceMm: of.peakDistanceMm,
    strutWidthMm: of.strutWidthMm,
    riseMm: of.riseMm,
    narrowing: of.narrowing,
    sliceIndex: of.sliceIndex,
    sliceOffsetMm: of.sliceOffsetMm,
    sopInstanceUid: cleanUid(of.sopInstanceUid, cleaner),
    frameNumber: of.frameNumber,
    flags: of.flags.map((flag) => cleanFlag(flag, cleaner)),
  };
}
