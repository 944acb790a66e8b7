import { expect, it } from 'vitest';
import { contrastChanges, setNoise } from '../../../../core/note/index.js';
import { LATER } from './noteFixture.js';
import { richNote } from './richNote.js';

it('says old and new value of each contrast on both kernels, with the formula, when the noise is another', () => {
  const note = richNote();
  const other = setNoise(note, 'pooled', LATER);
  const [was, is] = [note.contrasts[0], other.contrasts[0]];
  const digits = (value: number | null | undefined): string =>
    (value ?? Number.NaN).toFixed(1).replace('-', '−');
  expect(contrastChanges(note, other)).toBe(
    `C1: soft ${digits(was?.soft)} → ${digits(is?.soft)}, sharp ${digits(was?.sharp)} → ${digits(is?.sharp)}. CNR = (lumen − wall) / √((SD of lumen² + SD of wall²) / 2).`,
  );
  expect(contrastChanges(note, note)).toMatch(/^No contrast has changed\./);
});
