import { beforeAll, describe, expect, it } from 'vitest';
import { type Note, PROFILE_DEFINITION, parseNote } from '../../../../../core/note/index.js';
import { REMOVED } from '../../../../../core/report/deidentify/cleanText.js';
import { deidentifyNote, measurementTable } from '../../../../../core/report/index.js';
import { linesNote } from '../linesNote.js';
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

  it('names lines, stents and cuts anew, and keeps places, numbers and which lies on which cut', () => {
    expect(clean.profiles.map(({ id, label, plane }) => [id, label, plane])).toEqual([
      ['X1', 'Profile 1', undefined],
      ['X2', 'Profile 2', 'O1'],
    ]);
    expect(clean.stents.map(({ id, label, plane, findingId }) => [id, label, plane, findingId]))
      // The first stent belongs to the finding, the last lies on the cut.
      .toEqual([
        ['S1', 'Stent 1', undefined, 'D1'],
        ['S2', 'Stent 2', undefined, null],
        ['S3', 'Stent 3', 'O1', null],
      ]);
    expect(clean.planes.map(({ id, label, courseMm }) => [id, label, courseMm])).toEqual([
      ['O1', 'Cut 1', told.planes[0]?.courseMm],
    ]);
    expect(clean.profiles[0]?.definition).toBe(PROFILE_DEFINITION);
    expect(clean.profiles[1]?.definition).toBe(REMOVED);
    expect(clean.planes[0]?.resampling).toBe(REMOVED);
    expect(clean.stents[1]?.fit?.reason).toEqual({ code: 'motion', text: REMOVED });
    expect(clean.profiles[0]?.quoteReason).toBe('');
    const { images: _, ...numbers } = clean.stents[0]?.fit ?? { images: [] };
    const { images: __, ...before } = told.stents[0]?.fit ?? { images: [] };
    expect(numbers).toEqual(before);
  });

  it('makes the reason of a profile anew where it is the program’s', async () => {
    const profiles = told.profiles.map((profile) => ({
      ...profile,
      quoteBy: 'proposal' as const,
      quoteReason: 'Fernsby says so',
    }));
    const { note } = await deidentifyNote({ ...told, profiles }, { salt: SALT, digest });
    expect(note.profiles.map(({ quoteReason }) => quoteReason)).toEqual([
      'Edges and widths: the sharp kernel blurs less.',
      'No visible width on the sharp kernel. The soft one is quoted.',
    ]);
  });

  it('gives images of fits and cuts the new UIDs of the same images elsewhere', () => {
    const [profile] = clean.profiles;
    const [stent] = clean.stents;
    const [plane] = clean.planes;
    expect(stent?.fit?.images[0]?.sopInstanceUid).toBe(profile?.soft?.sopInstanceUid);
    expect(stent?.fit?.images[1]?.sopInstanceUid).toBe(plane?.source.sharp?.last.sopInstanceUid);
    expect(plane?.source.soft?.first).toEqual({
      sopInstanceUid: expect.stringMatching(/^2\.25\.\d{30,39}$/),
      frameNumber: null,
      sliceIndex: 0,
    });
  });

  it('maps names that are not the program’s, wherever a cut or a stent is named', async () => {
    const lines = linesNote();
    const foreign: Note = {
      ...lines,
      planes: lines.planes.map((plane) => ({ ...plane, id: 'Quillfeather' })),
      stents: lines.stents.map((stent, index) => ({
        ...stent,
        id: `Ottoline ${index}`,
        ...(stent.plane === undefined ? {} : { plane: 'Quillfeather' }),
      })),
      regions: lines.regions.map((region) =>
        region.plane === undefined ? region : { ...region, plane: 'Quillfeather' },
      ),
      edges: lines.edges.map((edge) => ({ ...edge, plane: 'a cut that is gone' })),
    };
    const { note } = await deidentifyNote(foreign, { salt: SALT, digest });
    expect(JSON.stringify(note)).not.toMatch(/Quillfeather|Ottoline|gone/);
    const [plane] = note.planes;
    expect(plane?.id).toMatch(/^item-\d$/);
    expect(note.stents.at(-1)?.plane).toBe(plane?.id);
    expect(note.regions.find(({ id }) => id === 'R1')?.plane).toBe(plane?.id);
    expect(note.edges[0]?.plane).toBe('unknown');
    expect(parseNote(note).ok).toBe(true);
  });
});
