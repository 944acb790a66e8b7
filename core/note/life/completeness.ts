import type { Role } from '../../region/roles.js';
import type { Quoted } from '../quoteSchema.js';
import type { FindingKind, Note, NoteFinding, NoteRegion } from '../schema.js';
import { segmentOf } from '../segments.js';

/** Something that a complete note of its kind would say. It is told, and stops nothing. */
export interface Missing {
  /** The finding that it is missing from; null for the note as a whole. */
  readonly findingId: string | null;
  readonly code: string;
  readonly text: string;
}

/** What the kinds of finding need beside segment and assessability. */
const ROLES_NEEDED: Readonly<Record<FindingKind, readonly Role[]>> = {
  stent: ['lumen', 'wall'],
  'non-calcified plaque': ['plaque', 'lumen'],
  'mixed plaque': ['plaque', 'lumen'],
  'calcified plaque': ['plaque', 'lumen'],
  'native lumen': ['lumen'],
  reference: ['reference'],
};

/** What is still missing, note first, then finding by finding in the note's order. */
export function completeness(note: Note): readonly Missing[] {
  return [...ofNote(note), ...note.findings.flatMap((finding) => ofFinding(note, finding))];
}

function ofNote(note: Note): readonly Missing[] {
  const { conditions, regions, contrasts, edges, profiles, stents } = note;
  const isEmpty = [regions, edges, profiles, stents].every(({ length }) => length === 0);
  const missing = (code: string, text: string): Missing => ({ findingId: null, code, text });
  const unassigned = regions.filter(({ findingId }) => findingId === null);
  return [
    ...(note.reader.trim() === ''
      ? [missing('reader', 'The reader’s name, in the settings.')]
      : []),
    ...(isEmpty ? [missing('regions', 'Nothing is measured yet.')] : []),
    ...(conditions.kvp === null
      ? [missing('kvp', 'The tube voltage: the files do not state it.')]
      : []),
    ...(conditions.phasePercent === null
      ? [missing('phase', 'The cardiac phase: the files do not state it.')]
      : []),
    ...(conditions.contrastAgent === null
      ? [missing('contrast-agent', 'The contrast agent: the files do not state it.')]
      : []),
    ...(regions.length > 0 && !regions.some(({ role }) => role === 'reference')
      ? [missing('reference', 'A reference region in the aorta or a chamber.')]
      : []),
    ...(unassigned.length > 0
      ? [missing('unassigned', `A finding for ${listed(unassigned)}.`)]
      : []),
    ...(note.anatomy.dominance === null
      ? [missing('dominance', 'The dominance of the coronary tree.')]
      : []),
    ...contrasts
      .filter(({ soft, sharp }) => soft === null && sharp === null)
      .map(({ id }) => missing('contrast-value', `Contrast ${id} has a value on neither kernel.`)),
    ...[...edges, ...profiles]
      .filter(isMuteChoice)
      .map(({ label }) => missing('quote-reason', `Why ${label} is quoted as it is.`)),
  ];
}

function ofFinding(note: Note, finding: NoteFinding): readonly Missing[] {
  const name = nameOf(finding);
  const missing = (code: string, what: string): Missing => ({
    findingId: finding.id,
    code,
    text: `${name}: ${what}.`,
  });
  const own = note.regions.filter(({ findingId }) => findingId === finding.id);
  const absent = finding.segment !== null && note.anatomy.absentSegments.includes(finding.segment);
  return [
    ...(finding.kind !== 'reference' && finding.segment === null
      ? [missing('segment', 'the coronary segment')]
      : []),
    ...(absent
      ? [missing('absent-segment', 'this segment is said to be absent in this heart')]
      : []),
    ...ROLES_NEEDED[finding.kind]
      .filter((role) => !own.some((region) => region.role === role))
      .map((role) => missing(`no-${role}`, `a ${role} region`)),
    ...(finding.kind === 'stent' ? ofStent(note, finding, missing) : []),
    ...(finding.kind !== 'reference' ? ofAssessability(finding, missing) : []),
    ...(note.pair.sharp === null
      ? []
      : own
          .filter((region) => region.soft === null || region.sharp === null)
          .map(({ label }) => missing('one-kernel', `${label} on both kernels`))),
    ...own
      .filter(isMuteChoice)
      .map(({ label }) => missing('quote-reason', `why ${label} is quoted as it is`)),
  ];
}

function ofStent(
  { stents, pair }: Note,
  finding: NoteFinding,
  missing: (code: string, what: string) => Missing,
): readonly Missing[] {
  // A fit that gives no value says why, and is no longer missing; without a sharp kernel there can be none.
  const isFitted = stents.some(({ findingId, fit }) => findingId === finding.id && fit !== null);
  return [
    ...(finding.nominalMm === null ? [missing('nominal', 'the nominal diameter')] : []),
    ...(finding.lengthMm === null ? [missing('length', 'the nominal length')] : []),
    ...(finding.overlap === null ? [missing('overlap', 'whether it overlaps another stent')] : []),
    ...(isFitted || pair.sharp === null
      ? []
      : [missing('no-fitted-stent', 'a fitted stent, or the reason why there is none')]),
  ];
}

function ofAssessability(
  { assessability, reason }: NoteFinding,
  missing: (code: string, what: string) => Missing,
): readonly Missing[] {
  if (assessability === null) return [missing('assessability', 'whether it can be assessed')];
  return assessability !== 'assessable' && reason.trim() === ''
    ? [missing('reason', `why it is ${assessability}`)]
    : [];
}

/** The reader chose a kernel against or without the proposal, and gave no reason. */
function isMuteChoice({ quote, quoteReason, quoteBy }: Quoted): boolean {
  return quoteBy === 'reader' && quote !== null && quoteReason.trim() === '';
}

function nameOf({ kind, segment }: NoteFinding): string {
  const place = segmentOf(segment);
  const words = place === undefined ? kind : `${kind} in ${place.abbreviation}`;
  return words.charAt(0).toUpperCase() + words.slice(1);
}

function listed(regions: readonly NoteRegion[]): string {
  return regions.map(({ label }) => label).join(', ');
}
