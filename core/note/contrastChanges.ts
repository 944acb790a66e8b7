import { formatQuantity } from '../format/index.js';
import type { Note, NoteContrast } from './schema.js';

/** What has become of the contrasts, a sentence for the reader: old and new values on both kernels, and the formula. */
export function contrastChanges(
  before: Pick<Note, 'contrasts'>,
  after: Pick<Note, 'contrasts'>,
): string {
  const was = new Map(before.contrasts.map((contrast) => [contrast.id, contrast]));
  const changes = after.contrasts.flatMap((contrast) => {
    const old = was.get(contrast.id);
    return old === undefined || isSame(old, contrast) ? [] : [sentence(old, contrast)];
  });
  const formulas = [...new Set(after.contrasts.map(({ formula }) => formula))];
  if (changes.length === 0) return `No contrast has changed. ${formulas.join('; ')}.`;
  return `${changes.join('; ')}. ${formulas.join('; ')}.`;
}

function sentence(old: NoteContrast, now: NoteContrast): string {
  const part = (name: 'soft' | 'sharp'): string =>
    `${name} ${formatQuantity(old[name], 'ratio')} → ${formatQuantity(now[name], 'ratio')}`;
  return `${now.id}: ${part('soft')}, ${part('sharp')}`;
}

function isSame(a: NoteContrast, b: NoteContrast): boolean {
  return a.soft === b.soft && a.sharp === b.sharp && a.formula === b.formula;
}
