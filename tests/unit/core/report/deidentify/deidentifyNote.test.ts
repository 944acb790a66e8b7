import { beforeAll, describe, expect, it } from 'vitest';
import { type Note, parseNote } from '../../../../../core/note/index.js';
import { REMOVED } from '../../../../../core/report/deidentify/cleanText.js';
import { deidentifyNote, measurementTable } from '../../../../../core/report/index.js';
import { digest, TELLING, tellingNote } from '../sr/tellingNote.js';

const SALT = 'a salt of this test alone';

let told: Note;
let clean: Note;

beforeAll(async () => {
  told = await tellingNote();
  clean = (await deidentifyNote(told, { salt: SALT, digest })).note;
});

describe('deidentifyNote', () => {
  it('leaves nothing that says who or when', () => {
    const text = JSON.stringify(clean);
    expect(TELLING.filter((value) => text.includes(value))).toEqual([]);
    const before = JSON.stringify(told);
    const said = TELLING.filter((value) => before.includes(value));
    // The note does say them before; formatted dates are made by the exports.
    expect(said.length).toBeGreaterThanOrEqual(TELLING.length - 3);
  });

  it('leaves no UID of the files', () => {
    const uids = JSON.stringify(told).match(/2\.25\.77001[\d.]*/g) ?? [];
    expect(new Set(uids).size).toBeGreaterThanOrEqual(7);
    expect(JSON.stringify(clean)).not.toContain('77001');
  });

  it('keeps every number, flag code, finding and quote', () => {
    const numbers = (note: Note) =>
      measurementTable(note).rows.map(({ id, kernels, segment, finding, assessability }) => ({
        id,
        segment,
        finding,
        assessability,
        kernels: kernels.map(({ kernel, quoted, quantities, sliceIndex }) => ({
          kernel,
          quoted,
          quantities,
          sliceIndex,
        })),
      }));
    expect(numbers(clean)).toEqual(numbers(told));
    expect(clean.regions[1]?.sharp?.flags).toEqual([
      { code: 'not-one-acquisition', text: 'Not measured here: not one acquisition.' },
    ]);
  });

  it('gives one UID one new UID throughout, in fields, keys and sentences', () => {
    const { soft } = clean.pair;
    expect(soft.seriesInstanceUid).toMatch(/^2\.25\.\d{30,39}$/);
    expect(soft.key.startsWith(soft.seriesInstanceUid)).toBe(true);
    expect(soft.findings[1]?.text).toBe(`Series ${soft.seriesInstanceUid} was made.`);
    const frame = clean.pair.evidence.find(({ check }) => check === 'frame of reference');
    expect(frame?.text).toBe(`frame of reference: ${clean.conditions.frameOfReferenceUid} in both`);
    const images = new Set(clean.regions.map((region) => region.soft?.sopInstanceUid));
    expect(images.size).toBe(new Set(told.regions.map((r) => r.soft?.sopInstanceUid)).size);
  });

  it('keeps of evidence about patient, time and agent its state alone', () => {
    expect(clean.pair.evidence.slice(0, 2)).toEqual([
      { check: 'patient', state: 'agrees', text: REMOVED },
      { check: 'acquisition', state: 'agrees', text: REMOVED },
    ]);
    expect(clean.pair.evidence[4]?.text).toBe('shift 0.02 mm');
  });

  it('drops seal, amendments and digests, and says so', () => {
    expect(clean).toMatchObject({
      verification: 'UNVERIFIED',
      seal: null,
      amendments: [],
      frames: [],
      completion: 'COMPLETE',
    });
    expect(clean.deidentified?.join(' ')).toContain('113100');
  });

  it('makes the same note with the same salt, and no UID the same with another', async () => {
    expect((await deidentifyNote(told, { salt: SALT, digest })).note).toEqual(clean);
    const other = (await deidentifyNote(told, { salt: `${SALT}!`, digest })).note;
    expect(other.study.studyInstanceUid).not.toBe(clean.study.studyInstanceUid);
    expect(other.id).not.toBe(clean.id);
  });

  it('tells the maker of the export which image a new UID stands for', async () => {
    const { note, originalUid } = await deidentifyNote(told, { salt: SALT, digest });
    expect(originalUid(note.regions[0]?.soft?.sopInstanceUid ?? '')).toBe(
      told.regions[0]?.soft?.sopInstanceUid,
    );
    expect(originalUid('2.25.1')).toBeUndefined();
  });

  it('is a note that can be read', () => {
    expect(parseNote(JSON.parse(JSON.stringify(clean)))).toEqual({ ok: true, value: clean });
  });

  it('gives identifiers that are no name, and labels of their role', async () => {
    const [first, second] = told.regions;
    if (first === undefined || second === undefined) throw new Error('no regions');
    const foreign: Note = { ...told, regions: [{ ...first, id: 'Mr Somebody' }, second] };
    const { note } = await deidentifyNote(foreign, { salt: SALT, digest });
    expect(note.regions.map(({ id, label }) => [id, label])).toEqual([
      ['item-1', 'Lumen 1'],
      ['W1', 'Wall 1'],
    ]);
    expect(JSON.stringify(note)).not.toContain('Somebody');
  });
});
