import { type Result, refuse, success } from '../result.js';
import type { ProfileLine } from '../stent/index.js';
import { nextNumber, rememberedNumbers } from './numbering.js';
import type { NoteProfile, NoteProfileValue } from './profileSchema.js';
import { profileQuote } from './quoteProposal.js';
import type { Quoted } from './quoteSchema.js';
import type { Note } from './schema.js';
import { touched } from './touched.js';

/** Letter that begins the identifier of a profile. */
export const PROFILE_LETTER = 'X';

/** Bands of a profile, mm: a line without width up to one that no round vessel allows. */
export const PROFILE_BAND_MM = { least: 0, most: 4, usual: 1 } as const;

/** How the numbers of a profile are defined; it stands in the note and in every export. */
export const PROFILE_DEFINITION =
  'Samples by cubic interpolation every quarter of a pixel, mean over the band. With two struts: visible width between the inner half-height points, midway between each peak and the median of the middle third between the peaks; strut width between a strut’s inner and outer half-height points; narrowing = 1 - visible width / nominal inner diameter. Without struts: visible width at half height between the highest value and the lowest on either side. Rise: 10–90 % distance of the inner edges.';

/** What a profile measures on both kernels; null on a kernel where it was not measured. */
export interface ProfileValues {
  readonly soft: NoteProfileValue | null;
  readonly sharp: NoteProfileValue | null;
}

/** Where a profile lies, with the nominal inner diameter and the oblique plane, if any. */
export type PlacedProfile = ProfileLine & { readonly plane?: string | undefined };

/** Adds a profile under the next free name: 'X2', 'Profile 2'. */
export function addProfile(
  note: Note,
  line: PlacedProfile,
  { soft, sharp }: ProfileValues,
  now: string,
): { readonly note: Note; readonly profile: NoteProfile } {
  const { id, number, lastNumbers } = nextNumber(note, PROFILE_LETTER);
  const { quote, reason: quoteReason } = profileQuote({ soft, sharp });
  const { fromMm, toMm, bandMm, nominalMm, plane } = line;
  const profile: NoteProfile = {
    id,
    label: `Profile ${number}`,
    fromMm,
    toMm,
    bandMm,
    ...(nominalMm === undefined ? {} : { nominalMm }),
    ...(plane === undefined ? {} : { plane }),
    definition: PROFILE_DEFINITION,
    quote,
    quoteReason,
    quoteBy: 'proposal',
    soft,
    sharp,
  };
  return {
    note: touched(note, { profiles: [...note.profiles, profile], lastNumbers }, now),
    profile,
  };
}

/** Gives a profile another place, band or nominal diameter; it comes with what it measures then. */
export function changeProfile(
  note: Note,
  id: string,
  { fromMm, toMm, bandMm, nominalMm }: ProfileLine,
  { soft, sharp }: ProfileValues,
  now: string,
): Result<{ readonly note: Note; readonly profile: NoteProfile }> {
  const present = note.profiles.find((profile) => profile.id === id);
  if (present === undefined) return refuse('unknown-profile', `The note has no profile ${id}.`);
  const { nominalMm: _before, ...rest } = present;
  const profile: NoteProfile = {
    ...rest,
    fromMm,
    toMm,
    bandMm,
    ...(nominalMm === undefined ? {} : { nominalMm }),
    soft,
    sharp,
  };
  const profiles = note.profiles.map((other) => (other.id === id ? profile : other));
  return success({ note: touched(note, { profiles }, now), profile });
}

/** Takes the reader's choice of the kernel to quote for a profile, or gives it back to the proposal. */
export function changeProfileQuote(
  note: Note,
  id: string,
  change: Partial<Quoted>,
  now: string,
): Result<Note> {
  if (!note.profiles.some((profile) => profile.id === id))
    return refuse('unknown-profile', `The note has no profile ${id}.`);
  const profiles = note.profiles.map((other) =>
    other.id === id ? { ...other, ...change } : other,
  );
  return success(touched(note, { profiles }, now));
}

/** Removes a profile; its number is not used again. */
export function removeProfile(note: Note, id: string, now: string): Note {
  const profiles = note.profiles.filter((profile) => profile.id !== id);
  if (profiles.length === note.profiles.length) return note;
  return touched(note, { profiles, lastNumbers: rememberedNumbers(note) }, now);
}

/**
 * The note with every profile measured anew; a kernel that can't be measured now (null) keeps what it had. The same
 * note comes back where nothing has changed.
 */
export function withProfileValues(
  note: Note,
  measure: (profile: NoteProfile) => ProfileValues,
  now: string,
): Note {
  const profiles = note.profiles.map((profile): NoteProfile => {
    const { soft, sharp } = measure(profile);
    const next = { ...profile, soft: soft ?? profile.soft, sharp: sharp ?? profile.sharp };
    return JSON.stringify(next) === JSON.stringify(profile) ? profile : next;
  });
  const isSame = profiles.every((profile, index) => profile === note.profiles[index]);
  return isSame ? note : touched(note, { profiles }, now);
}
