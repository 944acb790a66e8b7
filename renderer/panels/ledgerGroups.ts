import {
  type Note,
  type NoteContrast,
  type NoteFinding,
  type NoteRegion,
  segmentOf,
} from '../../core/note/index.js';

/** Regions of one finding, or those that belong to none yet. */
export interface LedgerGroup {
  readonly finding: NoteFinding | undefined;
  readonly regions: readonly NoteRegion[];
}

type LedgerNote = Pick<Note, 'findings' | 'regions'>;

/**
 * The ledger's groups: references first, then by segment, findings without a segment after those with one, regions
 * without a finding last. Regions keep the order in which they were made. Findings without regions are left out.
 */
export function ledgerGroups({ findings, regions }: LedgerNote): readonly LedgerGroup[] {
  const rank = (finding: NoteFinding) =>
    finding.kind === 'reference' ? 0 : (finding.segment ?? 99);
  const ordered = findings.toSorted((a, b) => rank(a) - rank(b));
  const known = new Set(findings.map(({ id }) => id));
  const groups: LedgerGroup[] = ordered.map((finding) => ({
    finding,
    regions: regions.filter(({ findingId }) => findingId === finding.id),
  }));
  const loose = regions.filter(({ findingId }) => findingId === null || !known.has(findingId));
  return [...groups, { finding: undefined, regions: loose }].filter(
    (group) => group.regions.length > 0,
  );
}

/** Heading of a group: 'mLAD · Mid left anterior descending artery · stent'. */
export function groupTitle(finding: NoteFinding | undefined): string {
  if (finding === undefined) return 'Not assigned to a finding yet';
  const segment = segmentOf(finding.segment);
  const kind = finding.kind === 'reference' && !segment ? 'Reference' : finding.kind;
  return segment ? `${segment.number} ${segment.abbreviation} · ${segment.name} · ${kind}` : kind;
}

/** The contrasts in which a region is the lumen; the last made is the one that its row shows. */
export function contrastsOf(
  contrasts: readonly NoteContrast[],
  regionId: string,
): readonly NoteContrast[] {
  return contrasts.filter(({ lumen }) => lumen === regionId);
}
