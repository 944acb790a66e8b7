import { type Result, refuse, success } from '../result.js';
import { measuredContrast } from './measuredContrast.js';
import { CONTRAST_LETTER, nextNumber, rememberedNumbers } from './numbering.js';
import type { NoiseSource, PlanContrast } from './plan.js';
import type { Kernel, Note, NoteContrast, NoteRegion } from './schema.js';
import { touched } from './touched.js';

/** What a contrast is made of. Without noise, the note's; without reference, the note's only reference region if it has just one. */
export interface ContrastParts {
  readonly lumen: string;
  readonly wall: string;
  readonly noise?: NoiseSource;
  readonly reference?: string;
}

/** Adds a contrast between two regions of the note and computes it on both kernels. */
export function addContrast(
  note: Note,
  parts: ContrastParts,
  now: string,
): Result<{ readonly note: Note; readonly contrast: NoteContrast }> {
  const { id, lastNumbers } = nextNumber(note, CONTRAST_LETTER);
  const checked = checkedContrast(note, { noise: note.noise, ...parts, id });
  if (!checked.ok) return checked;
  const contrast = computed(note, checked.value);
  const contrasts = [...note.contrasts, contrast];
  return success({ note: touched(note, { contrasts, lastNumbers }, now), contrast });
}

/** Changes what a contrast is made of and computes it again. */
export function changeContrast(
  note: Note,
  id: string,
  change: Partial<ContrastParts>,
  now: string,
): Result<Note> {
  const present = note.contrasts.find((contrast) => contrast.id === id);
  if (present === undefined) return refuse('unknown-contrast', `The note has no contrast ${id}.`);
  const checked = checkedContrast(note, { ...partsOf(present), ...change, id });
  if (!checked.ok) return checked;
  const contrast = computed(note, checked.value);
  const contrasts = note.contrasts.map((other) => (other.id === id ? contrast : other));
  return success(touched(note, { contrasts }, now));
}

/** Removes a contrast. Its number is not used again. */
export function removeContrast(note: Note, id: string, now: string): Note {
  const contrasts = note.contrasts.filter((contrast) => contrast.id !== id);
  return touched(note, { contrasts, lastNumbers: rememberedNumbers(note) }, now);
}

/** Takes another noise for the whole note: all its contrasts are computed anew, so that they stay comparable. */
export function setNoise(note: Note, noise: NoiseSource, now: string): Note {
  const contrasts = note.contrasts.map((contrast) =>
    computed(note, withReference(note, { ...partsOf(contrast), noise })),
  );
  return touched(note, { noise, contrasts }, now);
}

/** All contrasts of a note computed from its regions' present values. */
export function recomputedContrasts(note: Note): readonly NoteContrast[] {
  return note.contrasts.map((contrast) => computed(note, partsOf(contrast)));
}

/** True when a contrast's value rests on the region. */
export function usesRegion(contrast: PlanContrast, id: string): boolean {
  return contrast.lumen === id || contrast.wall === id || contrast.reference === id;
}

function computed(note: Note, contrast: PlanContrast): NoteContrast {
  const kernels: readonly Kernel[] = note.pair.sharp === null ? ['soft'] : ['soft', 'sharp'];
  const regions = new Map<string, NoteRegion>(note.regions.map((region) => [region.id, region]));
  return {
    ...contrast,
    ...measuredContrast(contrast, kernels, (id, kernel) => regions.get(id)?.[kernel]),
  };
}

function partsOf({ id, lumen, wall, noise, reference }: PlanContrast): PlanContrast {
  return { id, lumen, wall, noise, ...(reference === undefined ? {} : { reference }) };
}

function withReference(note: Note, contrast: PlanContrast): PlanContrast {
  if (contrast.noise !== 'reference' || contrast.reference !== undefined) return contrast;
  const [only, ...others] = note.regions.filter(({ role }) => role === 'reference');
  return only === undefined || others.length > 0 ? contrast : { ...contrast, reference: only.id };
}

function checkedContrast(note: Note, wanted: PlanContrast): Result<PlanContrast> {
  const contrast = withReference(note, wanted);
  const ids = [contrast.lumen, contrast.wall, contrast.reference];
  const unknown = ids.find((id) => id !== undefined && !note.regions.some((r) => r.id === id));
  if (unknown !== undefined) {
    return refuse('unknown-region', `The note has no region ${unknown}. Choose one that it has.`);
  }
  if (contrast.lumen === contrast.wall) {
    return refuse('same-region', 'Lumen and wall are the same region. Choose two.');
  }
  if (contrast.noise === 'reference' && contrast.reference === undefined) {
    return refuse(
      'no-reference',
      'The noise is the SD of a reference region. Choose which one, or another noise.',
    );
  }
  return success(contrast);
}
