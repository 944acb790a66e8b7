import type { RegionValue, Role, Shape } from '../region/index.js';
import { type Result, refuse, success } from '../result.js';
import { recomputedContrasts, usesRegion } from './contrasts.js';
import { usedFindings } from './findings.js';
import { nextRegionName, rememberedNumbers } from './numbering.js';
import type { Note, NoteContrast, NoteRegion } from './schema.js';
import { touched } from './touched.js';

/** What a region measures on both kernels; null on a kernel where it was not measured. */
export interface RegionValues {
  readonly soft: RegionValue | null;
  readonly sharp: RegionValue | null;
}

export interface NewRegion extends RegionValues {
  readonly role: Role;
  readonly shape: Shape;
  /** Where in the finding the region lies, in the reader's words. */
  readonly place?: string;
  readonly findingId?: string;
  /** The oblique plane that it was drawn on. */
  readonly plane?: string;
}

/** Adds a region under the next free name of its role: 'L2', 'Lumen 2'. */
export function addRegion(
  note: Note,
  { role, shape, place = '', findingId, plane, soft, sharp }: NewRegion,
  now: string,
): { readonly note: Note; readonly region: NoteRegion } {
  const { id, label, lastNumbers } = nextRegionName(note, role);
  const region: NoteRegion = {
    id,
    role,
    shape,
    ...(plane === undefined ? {} : { plane }),
    label,
    place,
    findingId: findingId ?? null,
    quote: null,
    quoteReason: '',
    quoteBy: 'proposal',
    soft,
    sharp,
  };
  return {
    note: touched(note, { regions: [...note.regions, region], lastNumbers }, now),
    region,
  };
}

/** What of a region can be changed. A new shape comes with what it measures: old values of a new shape would be wrong. */
export type RegionChange = Partial<
  Pick<NoteRegion, 'role' | 'label' | 'place' | 'quote' | 'quoteReason' | 'quoteBy'>
> &
  ({ readonly shape?: never } | { readonly shape: Shape; readonly values: RegionValues });

/** A changed note, the region under its present name, and the contrasts that went with the change. */
export interface ChangedRegion {
  readonly note: Note;
  readonly region: NoteRegion;
  readonly removedContrasts: readonly NoteContrast[];
}

/**
 * Changes a region and computes the contrasts that rest on it. A new role gives a new name, since names say
 * the role; contrasts that used the region in its old role go, and are told.
 */
export function changeRegion(
  note: Note,
  id: string,
  change: RegionChange,
  now: string,
): Result<ChangedRegion> {
  const present = note.regions.find((region) => region.id === id);
  if (present === undefined) return refuse('unknown-region', `The note has no region ${id}.`);
  const renamed =
    change.role !== undefined && change.role !== present.role
      ? nextRegionName(note, change.role)
      : undefined;
  const region: NoteRegion = {
    ...present,
    id: renamed?.id ?? id,
    role: change.role ?? present.role,
    label: change.label ?? renamed?.label ?? present.label,
    place: change.place ?? present.place,
    quote: change.quote === undefined ? present.quote : change.quote,
    quoteReason: change.quoteReason ?? present.quoteReason,
    // Whoever states a kernel without saying so is the reader.
    quoteBy: change.quoteBy ?? (change.quote === undefined ? present.quoteBy : 'reader'),
    ...(change.shape === undefined ? {} : { shape: change.shape, ...change.values }),
  };
  const removedContrasts = renamed ? note.contrasts.filter((c) => usesRegion(c, id)) : [];
  const changed = touched(
    note,
    {
      regions: note.regions.map((other) => (other.id === id ? region : other)),
      contrasts: note.contrasts.filter((contrast) => !removedContrasts.includes(contrast)),
      lastNumbers: { ...rememberedNumbers(note), ...renamed?.lastNumbers },
    },
    now,
  );
  return success({
    note: { ...changed, contrasts: recomputedContrasts(changed) },
    region,
    removedContrasts,
  });
}

/** Removes a region, the contrasts that used it, and its finding when no other region belongs to it. */
export function removeRegion(
  note: Note,
  id: string,
  now: string,
): { readonly note: Note; readonly removedContrasts: readonly NoteContrast[] } {
  const removedContrasts = note.contrasts.filter((contrast) => usesRegion(contrast, id));
  const regions = note.regions.filter((region) => region.id !== id);
  const changes = {
    regions,
    contrasts: note.contrasts.filter((contrast) => !removedContrasts.includes(contrast)),
    findings: usedFindings(note.findings, regions),
    lastNumbers: rememberedNumbers(note),
  };
  return { note: touched(note, changes, now), removedContrasts };
}
