import { type Result, refuse, success } from '../result.js';
import { FINDING_LETTER, nextNumber, rememberedNumbers } from './numbering.js';
import type { Note, NoteFinding, NoteRegion } from './schema.js';
import { touched } from './touched.js';

/** What the reader says of the place where a region lies. A field left out keeps what it was. */
export type FindingFields = Partial<Omit<NoteFinding, 'id'>>;

/**
 * Says what a region belongs to. One finding is one segment, kind and nominal size:
 * - a region without a finding joins the one that is alike, or begins a new one (kind is then needed);
 * - a change of assessability, reason or size holds for all regions of the finding;
 * - another segment or kind moves this region only, to the finding that is alike or to a new one;
 * - findings that have become alike are merged, and one without regions goes.
 */
export function setFinding(
  note: Note,
  regionId: string,
  fields: FindingFields,
  now: string,
): Result<Note> {
  const region = note.regions.find(({ id }) => id === regionId);
  if (region === undefined) {
    return refuse('unknown-region', `The note has no region ${regionId}.`);
  }
  const present = note.findings.find(({ id }) => id === region.findingId);
  const kind = fields.kind ?? present?.kind;
  if (kind === undefined) {
    return refuse('no-kind', 'Choose what the finding is: stent, plaque, lumen or reference.');
  }
  const wanted: Omit<NoteFinding, 'id'> = {
    segment: fields.segment === undefined ? (present?.segment ?? null) : fields.segment,
    kind,
    nominalMm: fields.nominalMm === undefined ? (present?.nominalMm ?? null) : fields.nominalMm,
    lengthMm: fields.lengthMm === undefined ? (present?.lengthMm ?? null) : fields.lengthMm,
    overlap: fields.overlap === undefined ? (present?.overlap ?? null) : fields.overlap,
    location: fields.location ?? present?.location ?? '',
    assessability:
      fields.assessability === undefined ? (present?.assessability ?? null) : fields.assessability,
    reason: fields.reason ?? present?.reason ?? '',
  };
  const moves = !present || present.segment !== wanted.segment || present.kind !== wanted.kind;
  const changed = moves
    ? moved(note, region, wanted, fields)
    : updated(note, { ...wanted, id: present.id });
  return success(touched(note, withoutEmpty(note, changed), now));
}

/** Takes a region out of its finding. */
export function clearFinding(note: Note, regionId: string, now: string): Note {
  const regions = note.regions.map((region) =>
    region.id === regionId ? { ...region, findingId: null } : region,
  );
  return touched(note, withoutEmpty(note, { regions, findings: note.findings }), now);
}

/** The findings that at least one of the regions belongs to. */
export function usedFindings(
  findings: readonly NoteFinding[],
  regions: readonly NoteRegion[],
): readonly NoteFinding[] {
  return findings.filter(({ id }) => regions.some(({ findingId }) => findingId === id));
}

type Content = Pick<Note, 'regions' | 'findings'> & Partial<Pick<Note, 'lastNumbers'>>;

function moved(
  note: Note,
  region: NoteRegion,
  wanted: Omit<NoteFinding, 'id'>,
  fields: FindingFields,
): Content {
  const alike = note.findings.find(
    (other) =>
      other.id !== region.findingId &&
      sameKind(other, wanted) &&
      (fields.nominalMm === undefined || other.nominalMm === fields.nominalMm),
  );
  if (alike !== undefined) {
    // What the reader states now holds; what the region brings from elsewhere does not overwrite its new finding.
    const joined = { ...alike, ...fields };
    const findings = note.findings.map((other) => (other.id === alike.id ? joined : other));
    return { findings, regions: assigned(note.regions, [region.id], alike.id) };
  }
  const { id, lastNumbers } = nextNumber(note, FINDING_LETTER);
  return {
    findings: [...note.findings, { ...wanted, id }],
    regions: assigned(note.regions, [region.id], id),
    lastNumbers,
  };
}

function updated(note: Note, finding: NoteFinding): Content {
  const twin = note.findings.find(
    (other) =>
      other.id !== finding.id && sameKind(other, finding) && other.nominalMm === finding.nominalMm,
  );
  if (twin === undefined) {
    const findings = note.findings.map((other) => (other.id === finding.id ? finding : other));
    return { findings, regions: note.regions };
  }
  const merged: NoteFinding = {
    ...finding,
    assessability: finding.assessability ?? twin.assessability,
    reason: bothReasons(finding.reason, twin.reason),
  };
  const members = note.regions.filter(({ findingId }) => findingId === twin.id).map(({ id }) => id);
  return {
    findings: note.findings
      .filter(({ id }) => id !== twin.id)
      .map((other) => (other.id === finding.id ? merged : other)),
    regions: assigned(note.regions, members, finding.id),
  };
}

function withoutEmpty(note: Note, { regions, findings, lastNumbers }: Content): Partial<Note> {
  return {
    regions,
    findings: usedFindings(findings, regions),
    lastNumbers: lastNumbers ?? rememberedNumbers(note),
  };
}

function sameKind(a: Omit<NoteFinding, 'id'>, b: Omit<NoteFinding, 'id'>): boolean {
  return a.segment === b.segment && a.kind === b.kind;
}

function assigned(
  regions: readonly NoteRegion[],
  ids: readonly string[],
  findingId: string,
): readonly NoteRegion[] {
  return regions.map((region) => (ids.includes(region.id) ? { ...region, findingId } : region));
}

function bothReasons(a: string, b: string): string {
  if (a === '' || a === b) return b;
  return b === '' ? a : `${a}; ${b}`;
}
