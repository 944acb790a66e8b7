import { type PairTexture, visibleDisc } from '../quality/index.js';
import type { Kernel, Note } from './schema.js';
import type { RoseCriterion, Visibility } from './visibilitySchema.js';

/** What the reader asks: how strict, and at which contrast, typed in HU or that of a contrast of the note. */
export interface VisibilityChoice {
  readonly k: RoseCriterion;
  readonly contrast: { readonly id: string } | { readonly hu: number };
}

type Measured = Pick<Note, 'regions' | 'contrasts'>;

/** |lumen − wall| of a contrast on one kernel, HU; undefined where one of the two is not measured or the contrast is gone. */
export function contrastHu(note: Measured, contrastId: string, kernel: Kernel): number | undefined {
  const contrast = note.contrasts.find(({ id }) => id === contrastId);
  const meanHu = (wanted: string | undefined): number | null | undefined =>
    note.regions.find(({ id }) => id === wanted)?.[kernel]?.meanHu;
  const [lumen, wall] = [meanHu(contrast?.lumen), meanHu(contrast?.wall)];
  return typeof lumen === 'number' && typeof wall === 'number' ? Math.abs(lumen - wall) : undefined;
}

/** What a choice comes to with the textures of a pair; null where something of it is not to be had. */
export function visibilityOf(
  note: Measured,
  texture: PairTexture | undefined,
  { k, contrast }: VisibilityChoice,
): Visibility {
  const askedHu = (kernel: Kernel): number | null =>
    'hu' in contrast ? contrast.hu : (contrastHu(note, contrast.id, kernel) ?? null);
  const seenMm = (kernel: Kernel): number | null => {
    const [of, hu] = [texture?.[kernel], askedHu(kernel)];
    if (!of || hu === null) return null;
    const disc = visibleDisc(of, hu, k);
    return disc.ok ? disc.value : null;
  };
  return {
    k,
    contrastId: 'id' in contrast ? contrast.id : null,
    softHu: askedHu('soft'),
    sharpHu: askedHu('sharp'),
    softMm: seenMm('soft'),
    sharpMm: seenMm('sharp'),
  };
}

/** The choice that a visibility was made from; undefined where its typed contrast is missing. */
export function choiceOf(visibility: Visibility): VisibilityChoice | undefined {
  const { k, contrastId, softHu, sharpHu } = visibility;
  if (contrastId !== null) return { k, contrast: { id: contrastId } };
  const hu = softHu ?? sharpHu;
  return hu === null ? undefined : { k, contrast: { hu } };
}

/**
 * A note's visibility computed from its present regions and textures, so that it never stands beside values that it
 * does not rest on; null when the contrast that it asked about is gone.
 */
export function renewedVisibility(note: Note): Visibility | null {
  const choice = note.visibility === null ? undefined : choiceOf(note.visibility);
  if (choice === undefined) return null;
  const { contrast } = choice;
  if ('id' in contrast && !note.contrasts.some(({ id }) => id === contrast.id)) return null;
  return visibilityOf(note, note.pair.texture, choice);
}

/** The note with its visibility computed from what it now holds; for changes that are no edit of the reader's. */
export function withRenewedVisibility(note: Note): Note {
  return note.visibility === null ? note : { ...note, visibility: renewedVisibility(note) };
}
