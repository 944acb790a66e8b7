import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { describe, expect, it } from 'vitest';
import { noteJsonSchema, parseNote, parsePlan, planOf } from '../../../../core/note/index.js';
import { linesNote } from '../report/linesNote.js';
import { richNote } from './richNote.js';

interface Ajv {
  compile(schema: unknown): (value: unknown) => boolean;
}

/** The validator Ajv, a general-purpose implementation of JSON Schema; it comes with the packager. */
function ajv(): Ajv {
  const require = createRequire(import.meta.url);
  const packager = createRequire(require.resolve('app-builder-lib/package.json'));
  const { Ajv2020 } = packager('ajv/dist/2020');
  return new Ajv2020({ strict: true });
}

const published = readFileSync(
  new URL('../../../../assets/note.schema.json', import.meta.url),
  'utf8',
);

const asJson = (value: unknown) => JSON.parse(JSON.stringify(value));

describe('the published schema of a note', () => {
  const valid = ajv().compile(JSON.parse(published));

  it('is up to date (else run: node assets/makeNoteSchema.mjs)', () => {
    expect(published).toBe(noteJsonSchema());
  });

  it('lets a real note pass', () => {
    expect(valid(asJson(richNote()))).toBe(true);
    expect(valid(asJson(linesNote()))).toBe(true);
  });

  it.each([
    ['no regions', { regions: undefined }],
    ['a version of its own', { version: 2 }],
    [
      'a segment that the model does not have',
      { findings: [{ ...richNote().findings[0], segment: 19 }] },
    ],
    ['a text for a number', { conditions: { ...richNote().conditions, kvp: '120' } }],
    ['a region without a shape', { regions: [{ ...richNote().regions[0], shape: undefined }] }],
  ])('stops a note with %s, and so does the program', (_, change) => {
    const broken = asJson({ ...richNote(), ...change });
    expect(valid(broken)).toBe(false);
    expect(parseNote(broken).ok).toBe(false);
  });
});

describe('parseNote', () => {
  it('reads back what was written, and its plan can be read as a plan', () => {
    const note = richNote();
    expect(parseNote(asJson(note))).toEqual({ ok: true, value: note });
    const plan = parsePlan(asJson(planOf(note)));
    expect(plan.ok && plan.value.plan.regions.map(({ id }) => id)).toEqual([
      'L1',
      'W1',
      'R1',
      'P1',
    ]);
    expect(plan.ok && plan.value.plan.contrasts).toEqual([
      { id: 'C1', lumen: 'L1', wall: 'W1', noise: 'reference', reference: 'R1' },
    ]);
    expect(plan.ok && plan.value.unknownFields).toEqual([]);
  });

  it.each([
    ['not-a-note', 'This is not a reading note: it has no "format": "diptych-note".', null],
    [
      'not-a-note',
      'This is not a reading note: its format is not "diptych-note".',
      { format: 'x' },
    ],
    [
      'newer-note',
      'The note is of version 2; this version of Diptych reads version 1. Use a newer Diptych.',
      { ...richNote(), version: 2 },
    ],
    [
      'broken-note',
      'The note can’t be read: completion must be "PARTIAL" or "COMPLETE".',
      { ...richNote(), completion: 'DONE' },
    ],
    [
      'broken-note',
      'The note can’t be read: study.patientId is missing; pair.soft.slices must be greater than 0.',
      {
        ...richNote(),
        study: { ...richNote().study, patientId: undefined },
        pair: { ...richNote().pair, soft: { ...richNote().pair.soft, slices: 0 } },
      },
    ],
  ])('refuses with %s: %s', (code, text, json) => {
    expect(parseNote(json)).toEqual({ ok: false, refusal: { code, text } });
  });
});
