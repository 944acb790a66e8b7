import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Note } from '../../core/note/index.js';
import {
  deidentifyNote,
  imageLookup,
  measurementTable,
  renamedLookup,
  toStructuredReport,
} from '../../core/report/index.js';
import { printedAs } from '../../core/report/printedAs.js';
import { pythonHas, pythonJson } from '../support/python.js';
import { pair, SHARP_SERIES } from '../unit/core/note/noteFixture.js';
import { richNote } from '../unit/core/note/richNote.js';
import { linesNote } from '../unit/core/report/linesNote.js';
import { digest, tellingNote } from '../unit/core/report/sr/tellingNote.js';

const NOW = '2026-01-08T10:30:00.000+01:00';
const folder = mkdtempSync(join(tmpdir(), 'sr-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const has = (tool: string): boolean => spawnSync(tool, ['--version']).error === undefined;
const hasDciodvfy = has('dciodvfy');
const hasDsrdump = has('dsrdump');
const hasPydicom = pythonHas('pydicom');

/** A note with a profile across a lumen on the soft kernel, and one across a stent with an unended flank on the sharp one. */
function lumenProfile(): Note {
  const note = linesNote();
  const [profile] = note.profiles;
  if (!profile?.soft || !profile.sharp) throw new Error('no profile');
  const { soft, sharp } = profile;
  const noStruts = { kind: 'lumen', struts: [], peakDistanceMm: null, strutWidthMm: null } as const;
  return {
    ...note,
    edges: [],
    stents: [],
    profiles: [
      {
        ...profile,
        soft: { ...soft, ...noStruts, narrowing: null },
        sharp: { ...sharp, strutWidthMm: null },
      },
    ],
  };
}

/** Notes of every kind that a document is made of, under the names of their files. */
async function documents(): Promise<Readonly<Record<string, { note: Note; bytes: Uint8Array }>>> {
  const { soft, sharp } = await pair();
  const images = imageLookup([soft, sharp]);
  const rich = richNote();
  const told = await tellingNote();
  const clean = await deidentifyNote(told, { salt: 'a salt of this test alone', digest });
  const [region] = rich.regions;
  if (region?.soft == null) throw new Error('no region');
  const flat = { ...region.soft, sdHu: 0, snr: null, standardErrorHu: 1.25 };
  const bare: Note = {
    ...rich,
    pair: { ...rich.pair, sharp: null },
    regions: [{ ...region, findingId: null, soft: flat, sharp: null }],
    contrasts: [],
    findings: [],
    reader: '',
    synthetic: true,
    study: { ...rich.study, patientName: 'Ünal^Çiğdem=山田^太郎=やまだ^たろう', patientId: null },
  };
  const framed: Note = {
    ...rich,
    regions: rich.regions.map((one) => ({
      ...one,
      soft: one.soft && { ...one.soft, sopInstanceUid: '1.2.840.1', frameNumber: 3 },
      sharp: null,
    })),
  };
  const missing: Note = {
    ...rich,
    regions: rich.regions.map((one, index) =>
      index === 0
        ? { ...one, sharp: null }
        : { ...one, soft: one.soft && { ...one.soft, meanHu: null, medianHu: null } },
    ),
    contrasts: rich.contrasts.map((one) => ({ ...one, soft: null })),
    seal: { by: 'Reader^One', at: NOW, sha256: 'ab'.repeat(32) },
    verification: 'VERIFIED',
  };
  const study = '2.25.77001.9.9';
  const overridden: Note = {
    ...rich,
    pair: { ...rich.pair, overrides: [{ check: 'study', reason: 'moved between archives' }] },
  };
  const twoStudies = {
    ...images,
    studyOf: (uid: string) => (uid.startsWith(`${SHARP_SERIES}.`) ? study : images.studyOf(uid)),
  };
  const empty: Note = { ...rich, regions: [], contrasts: [], findings: [] };
  const make = (note: Note, lookup: Partial<typeof images> = {}) => ({
    note,
    bytes: toStructuredReport(note, { now: NOW, ...lookup }),
  });
  return {
    rich: make(rich, images),
    'verified and amended': make(told, images),
    'de-identified': make(clean.note, renamedLookup(images, clean.originalUid)),
    'one kernel, flat, synthetic': make(bare, images),
    'frames without the images': make(framed),
    'values missing': make(missing, images),
    'two studies': make(overridden, twoStudies),
    'two studies without the images': make(overridden),
    'lines, stents and cuts': make(linesNote(), images),
    'a lumen without struts': make(lumenProfile(), images),
    empty: make(empty),
  };
}

const NAMES = [
  'rich',
  'verified and amended',
  'de-identified',
  'one kernel, flat, synthetic',
  'frames without the images',
  'values missing',
  'two studies',
  'two studies without the images',
  'lines, stents and cuts',
  'a lumen without struts',
  'empty',
] as const;

let made: Awaited<ReturnType<typeof documents>> = {};

beforeAll(async () => {
  made = await documents();
  for (const [name, { bytes }] of Object.entries(made)) writeFileSync(fileOf(name), bytes);
});

const fileOf = (name: string) => join(folder, `${name.replace(/\W+/g, '-')}.dcm`);

function documentOf(name: string) {
  const document = made[name];
  if (document === undefined) throw new Error(`no document: ${name}`);
  return document;
}

/** What dciodvfy warns of here, each looked at: its lists lack what the standard leaves free. */
const KNOWN_WARNINGS = [
  // Attributes of type 2 that the note does not know; an index of a medium would want them.
  /needed to build DICOMDIR/,
  // A private coding scheme is declared in (0008,0110), where any is allowed (PS3.16 8.2).
  /Unrecognized defined term <(99DIPTYCH|2\.25\.\d+)>/,
  // The reader's name as it was typed, without components.
  /Retired Person Name form/,
  // A dummy date of a de-identified document.
  /dubious.*19000101/,
];

describe.skipIf(!hasDciodvfy)('dciodvfy (skipped without dicom3tools)', () => {
  it.each(NAMES)('finds no error in: %s', (name) => {
    const { stdout, stderr } = spawnSync('dciodvfy', [fileOf(name)], {
      encoding: 'utf8',
      maxBuffer: 64 * 1024 * 1024,
    });
    const lines = `${stdout}${stderr}`.split('\n').filter((line) => line !== '');
    expect(lines).toContain('ComprehensiveSR');
    expect(lines.filter((line) => line.startsWith('Error'))).toEqual([]);
    const warnings = lines.filter((line) => line.startsWith('Warning'));
    expect(warnings.filter((line) => !KNOWN_WARNINGS.some((known) => known.test(line)))).toEqual(
      [],
    );
  });

  it('does find an error in a document that is wrong', () => {
    const bytes = documentOf('rich').bytes.slice();
    const text = Buffer.from(bytes).toString('latin1');
    // PARTIAL, a defined term of Completion Flag (0040,A491), becomes something else.
    bytes[text.indexOf('PARTIAL')] = 'X'.charCodeAt(0);
    writeFileSync(join(folder, 'wrong.dcm'), bytes);
    const { stderr } = spawnSync('dciodvfy', [join(folder, 'wrong.dcm')], { encoding: 'utf8' });
    expect(stderr).toContain('Error');
  });
});

interface DumpedNumber {
  readonly group: string;
  readonly code: string;
  derivation: string;
  readonly text: string;
  readonly unit: string;
}

/** The NUM items of the measurement groups as dsrdump prints them. */
function dumpedNumbers(name: string): readonly DumpedNumber[] {
  const { status, stdout, stderr } = spawnSync('dsrdump', ['+Pl', '+Pc', fileOf(name)], {
    encoding: 'utf8',
    maxBuffer: 64 * 1024 * 1024,
  });
  expect(status).toBe(0);
  expect(stderr.split('\n').filter((line) => /^[EF]:/.test(line))).toEqual([]);
  const numbers: DumpedNumber[] = [];
  let group = '';
  for (const line of stdout.split('\n')) {
    group = /TEXT:\(112039,DCM,.*\)="(.*)">/.exec(line)?.[1] ?? group;
    const number =
      /<contains NUM:\(([^,]+),([^,]+),"[^"]*"\)=(?:"([^"]*)" \(([^,]*),UCUM,.*\)|(.*))>/.exec(
        line,
      );
    if (number !== null) {
      const [, code = '', scheme = '', text = '', unit = ''] = number;
      numbers.push({ group, code: `${scheme} ${code}`, derivation: '', text, unit });
    }
    const derivation = /CODE:\(121401,DCM,.*\)=\(([^,]+),SCT,/.exec(line)?.[1];
    const last = numbers.at(-1);
    if (derivation !== undefined && last !== undefined) last.derivation = derivation;
  }
  return numbers;
}

/** Codes by quantity: CID 7469, CID 7464, and our own where these have none. Written out again, not taken from the code. */
const CODES: Readonly<Record<string, readonly [string, string]>> = {
  mean: ['DCM 112031', '373098007'],
  SD: ['DCM 112031', '386136009'],
  median: ['DCM 112031', '373099004'],
  minimum: ['DCM 112031', '255605001'],
  maximum: ['DCM 112031', '56851009'],
  n: ['99DIPTYCH N', ''],
  area: ['SCT 131184002', ''],
  'sampled area': ['99DIPTYCH SAMPLEDAREA', ''],
  SNR: ['DCM 113060', ''],
  'standard error': ['99DIPTYCH STDERR', ''],
  placement: ['99DIPTYCH PLACEMENT', ''],
  CNR: ['99DIPTYCH CNR', ''],
  'edge rise': ['99DIPTYCH EDGERISE', ''],
  'edge rise standard error': ['99DIPTYCH EDGERISESE', ''],
  'edge crossings': ['99DIPTYCH EDGECROSS', ''],
  'blur FWHM': ['99DIPTYCH BLURFWHM', ''],
  'edge step': ['99DIPTYCH EDGESTEP', ''],
  'edge pixels': ['99DIPTYCH EDGEN', ''],
  'visible width': ['99DIPTYCH VISIBLEWIDTH', ''],
  'strut peak distance': ['99DIPTYCH STRUTPEAKS', ''],
  'strut width': ['99DIPTYCH STRUTWIDTH', ''],
  'inner edge rise': ['99DIPTYCH INNERRISE', ''],
  'lumen level': ['99DIPTYCH LUMENLEVEL', ''],
  'artificial narrowing': ['99DIPTYCH NARROWING', ''],
  'strut diameter': ['99DIPTYCH STENTDIAM', ''],
  'strut diameter standard error': ['99DIPTYCH STENTDIAMSE', ''],
  'strut diameter standard error by refits': ['99DIPTYCH STENTDIAMRE', ''],
  'fitted lumen': ['99DIPTYCH STENTLUMEN', ''],
  'fitted lumen standard error': ['99DIPTYCH STENTLUMENSE', ''],
  'fitted lumen standard error by refits': ['99DIPTYCH STENTLUMENRE', ''],
  'wall width': ['99DIPTYCH WALLWIDTH', ''],
  'wall width standard error': ['99DIPTYCH WALLWIDTHSE', ''],
  'fitted wall': ['99DIPTYCH WALLHU', ''],
  'fitted wall standard error': ['99DIPTYCH WALLHUSE', ''],
  'strut line mass': ['99DIPTYCH STRUTMASS', ''],
  'strut line mass standard error': ['99DIPTYCH STRUTMASSSE', ''],
  'shared blur': ['99DIPTYCH SHAREDBLUR', ''],
  'shared blur standard error': ['99DIPTYCH SHAREDBLURSE', ''],
  'chi square': ['99DIPTYCH CHISQUARE', ''],
  'degrees of freedom': ['99DIPTYCH DF', ''],
  tilt: ['99DIPTYCH TILT', ''],
  'fitted slices': ['99DIPTYCH FITSLICES', ''],
  'plain region': ['99DIPTYCH PLAINREGION', ''],
  'plain region radius': ['99DIPTYCH PLAINRADIUS', ''],
  'noise around the stent': ['99DIPTYCH STENTNOISE', ''],
};
/** Numbers without a unit that are no ratios. */
const WITHOUT_UNIT: readonly string[] = ['chi square', 'degrees of freedom'];
/** UCUM. */
const UNITS: Readonly<Record<string, string>> = {
  HU: "[hnsf'U]",
  'mm²': 'mm2',
  px: '{pixels}',
  mm: 'mm',
  '%': '%',
  '°': 'deg',
  HU·mm: "[hnsf'U].mm",
  slices: '{slices}',
  '': '{ratio}',
};

describe.skipIf(!hasDsrdump)('dsrdump (skipped without dcmtk)', () => {
  it.each(NAMES)('finds every number of the table with its unit in: %s', (name) => {
    const expected = measurementTable(documentOf(name).note).rows.flatMap((row) =>
      row.kernels.flatMap((values) =>
        values.quantities.map(({ quantity, value, printed, unit }) => ({
          group: `${row.id}, ${row.label}, ${values.kernel}`,
          code: CODES[quantity]?.[0],
          derivation: CODES[quantity]?.[1],
          printed: value === null ? '' : printed,
          unit: value === null ? '' : WITHOUT_UNIT.includes(quantity) ? '1' : UNITS[unit],
        })),
      ),
    );
    const quantityOf = ({ code, derivation }: DumpedNumber) =>
      Object.keys(CODES).find((key) => CODES[key]?.[0] === code && CODES[key]?.[1] === derivation);
    const found = dumpedNumbers(name).map(({ text, ...number }) => ({
      ...number,
      printed: text === '' ? '' : printedAs(quantityOf({ text, ...number }) ?? '', Number(text)),
    }));
    expect(found).toEqual(expected);
    if (name !== 'empty') expect(found.length).toBeGreaterThan(8);
    expect(found.some(({ printed }) => printed === '')).toBe(
      [
        'one kernel, flat, synthetic',
        'values missing',
        'a lumen without struts',
        // On a cut there is no noise of an image to tell, and a stent without a value has none of its numbers.
      ].includes(name),
    );
  });

  it('shows who verified and when, only of a document that is complete', () => {
    const dump = (name: string) =>
      spawnSync('dsrdump', ['+U8', fileOf(name)], { encoding: 'utf8' }).stdout;
    expect(dump('verified and amended')).toMatch(/Verification Flag +: VERIFIED/);
    expect(dump('verified and amended')).toContain(
      'Verifying Observers : 2026-01-06 09:00:00 +00:00, Fernsby^Hollis, Not stated',
    );
    expect(dump('values missing')).toMatch(/Verification Flag +: UNVERIFIED/);
    expect(dump('de-identified')).not.toContain('Verifying Observers');
  });
});

const READ = `
import json, sys, pydicom
def walk(items, path=()):
    for item in items:
        yield item, path
        if 'ContentSequence' in item:
            name = item.ConceptNameCodeSequence[0].CodeMeaning if 'ConceptNameCodeSequence' in item else ''
            yield from walk(item.ContentSequence, path + (name,))
ds = pydicom.dcmread(sys.argv[1])
regions, numbers, texts = [], [], []
for item, path in walk(ds.ContentSequence):
    name = item.ConceptNameCodeSequence[0].CodeMeaning if 'ConceptNameCodeSequence' in item else ''
    if item.ValueType == 'SCOORD':
        ref = item.ContentSequence[0].ReferencedSOPSequence[0]
        regions.append({'type': item.GraphicType, 'data': list(item.GraphicData), 'sop': ref.ReferencedSOPInstanceUID,
                        'kind': ref.ReferencedSOPClassUID})
    if item.ValueType == 'NUM':
        values = item.MeasuredValueSequence
        numbers.append({'name': name, 'path': path[0],
            'ds': str(values[0].NumericValue) if len(values) else None,
            'fd': values[0].FloatingPointValue if len(values) and 'FloatingPointValue' in values[0] else None,
            'qualifier': item.NumericValueQualifierCodeSequence[0].CodeValue if 'NumericValueQualifierCodeSequence' in item else None})
    if item.ValueType == 'TEXT': texts.append([name, item.TextValue])
other = [[e.StudyInstanceUID, r.ReferencedSOPInstanceUID] for e in ds.get('PertinentOtherEvidenceSequence', [])
         for s in e.ReferencedSeriesSequence for r in s.ReferencedSOPSequence]
evidence = [[r.ReferencedSOPInstanceUID, r.ReferencedSOPClassUID] for s in ds.get('CurrentRequestedProcedureEvidenceSequence', [])
            for e in s.ReferencedSeriesSequence for r in e.ReferencedSOPSequence]
print(json.dumps({'regions': regions, 'numbers': numbers, 'texts': texts, 'evidence': evidence, 'other': other,
  'patient': str(ds.PatientName), 'sop': ds.SOPInstanceUID, 'offset': ds.get('TimezoneOffsetFromUTC'),
  'date': ds.ContentDate, 'removed': ds.get('PatientIdentityRemoved'),
  'method': [c.CodeValue for c in ds.get('DeidentificationMethodCodeSequence', [])]}))
`;

interface Read {
  readonly regions: readonly {
    readonly type: string;
    readonly data: readonly number[];
    readonly sop: string;
    readonly kind: string;
  }[];
  readonly numbers: readonly {
    readonly name: string;
    readonly path: string;
    readonly ds: string | null;
    readonly fd: number | null;
    readonly qualifier: string | null;
  }[];
  readonly texts: readonly (readonly [string, string])[];
  readonly evidence: readonly (readonly [string, string])[];
  readonly other: readonly (readonly [string, string])[];
  readonly patient: string;
  readonly sop: string;
  readonly offset: string | null;
  readonly date: string;
  readonly removed: string | null;
  readonly method: readonly string[];
}

const read = (name: string) => pythonJson(READ, [fileOf(name)]) as Read;

describe.skipIf(!hasPydicom)('pydicom (skipped without python3-pydicom)', () => {
  it('reads contours in pixels whose first has its centre at 0.5', () => {
    const note = richNote();
    const { regions } = read('rich');
    expect(regions.map(({ type }) => type)).toEqual([
      ...Array.from({ length: 6 }, () => 'ELLIPSE'),
      'POLYLINE',
      'POLYLINE',
    ]);
    // The fixture: first pixel at (-10, -20), 0.25 mm between columns, 0.5 mm between rows; lumen about column 8, row 9,
    // half axes 0.6 mm along the row (2.4 columns) and 1.1 mm down (2.2 rows). PS3.3 C.18.6.1: 0.5 is a pixel's centre.
    const lumen = [6.1, 9.5, 10.9, 9.5, 8.5, 7.3, 8.5, 11.7];
    for (const [index, one] of lumen.entries()) {
      expect(regions[0]?.data[index]).toBeCloseTo(one, 5);
    }
    expect(regions[0]?.sop).toBe(note.regions[0]?.soft?.sopInstanceUid);
    expect(regions[0]?.kind).toBe('1.2.840.10008.5.1.4.1.1.2');
    const outline = [8.1, 8.1, 12.9, 8.1, 10.5, 10.9, 8.1, 8.1];
    for (const [index, one] of outline.entries()) {
      expect(regions[6]?.data[index]).toBeCloseTo(one, 4);
    }
  });

  it('reads the number itself: as text, or in full beside it', () => {
    const { numbers } = read('rich');
    const values = measurementTable(documentOf('rich').note).rows.flatMap(({ kernels }) =>
      kernels.flatMap(({ quantities }) => quantities.map(({ value }) => value)),
    );
    const measured = numbers.filter(({ path }) => path === 'Imaging Measurements');
    expect(measured.map(({ ds, fd }) => fd ?? (ds === null ? null : Number(ds)))).toEqual(values);
  });

  it('reads where lines and stents lie, and of a cut that it is resampled and from which series', () => {
    const { texts, evidence } = read('lines, stents and cuts');
    const of = (name: string) => texts.filter(([one]) => one === name).map(([, text]) => text);
    expect(of('Place of the measurement in patient space')).toContain(
      'from (-8.50, -15.25, 2.00) to (-4.50, -15.25, 2.00) mm, band 1.0 mm',
    );
    const cut =
      'Measured on an oblique plane, Cut 1 (O1), resampled by cubic convolution, mean over 1.5 mm from ';
    const no = ': no image of the study shows it.';
    expect(new Set(of('Resampled on an oblique plane'))).toEqual(
      new Set([
        `${cut}the soft series 2.25.77001.2.1${no}`,
        `${cut}the sharp series 2.25.77001.2.2${no}`,
        `${cut}both series 2.25.77001.2.1 / 2.25.77001.2.2${no}`,
      ]),
    );
    expect(of('Slice measured')).toContain('Slice 4 of 4, counted from 1; sharp kernel.');
    expect(of('Nominal inner diameter')).toContain('3 mm');
    expect(of('Definition of the numbers of this group')[0]).toMatch(/^Samples by cubic/);
    expect(of('Caution').some((text) => text.startsWith('Fitted stent values were tried'))).toBe(
      true,
    );
    // Images of the fit of both kernels, each in the evidence once: the third soft and the fourth sharp slice.
    const images = evidence.map(([sop]) => sop);
    expect(images.filter((sop) => sop === '2.25.77001.2.1.3')).toHaveLength(1);
    expect(images.filter((sop) => sop === '2.25.77001.2.2.4')).toHaveLength(1);
    // The first slices, which only the cut rests on, are named in words.
    expect(images).not.toContain('2.25.77001.2.1.1');
  });

  it('reads why a number has no value: CID 42', () => {
    const qualifiers = (name: string) =>
      read(name)
        .numbers.filter(({ ds }) => ds === null)
        .map((number) => [number.name, number.qualifier]);
    expect(qualifiers('one kernel, flat, synthetic')).toEqual([['Signal to noise', '114003']]);
    expect(qualifiers('values missing')).toContainEqual(['Contrast to noise ratio', '114006']);
    expect(qualifiers('values missing')).toContainEqual(['Attenuation Coefficient', '114006']);
    expect(qualifiers('a lumen without struts')).toEqual([
      ['Distance of the peaks of two struts', '114007'],
      ['Width of a strut at half height', '114007'],
      ['Artificial lumen narrowing against nominal diameter', '114007'],
      ['Width of a strut at half height', '114006'],
    ]);
  });

  it('reads names in other scripts, the local time and its offset', () => {
    expect(read('one kernel, flat, synthetic')).toMatchObject({
      patient: 'Ünal^Çiğdem=山田^太郎=やまだ^たろう',
      date: '20260108',
      offset: '+0100',
    });
  });

  it('says that it is synthetic, that a contour is not given, and what was amended', () => {
    const said = (name: string) => read(name).texts.map(([what, text]) => `${what}: ${text}`);
    expect(said('one kernel, flat, synthetic')).toContain(
      'Caution: SYNTHETIC: computed images of no patient. For demonstration only.',
    );
    expect(said('rich').some((text) => text.startsWith('Caution: SYNTHETIC'))).toBe(false);
    const framed = said('frames without the images');
    expect(framed.filter((text) => text.startsWith('Contour not given')).length).toBe(4);
    const told = said('verified and amended');
    expect(told.find((text) => text.startsWith('Amendment'))).toMatch(
      /^Amendment: 2026-01-06T08:00:00.000Z, Marrow: she moved\r?\nThe comment was changed\.$/,
    );
    expect(told).toContain(
      'Identity of the patient in this document: With identity, for the patient’s record.',
    );
  });

  it('names every image that it refers to as evidence, frames under their multi-frame image', () => {
    expect(read('frames without the images').evidence).toEqual([
      ['1.2.840.1', '1.2.840.10008.5.1.4.1.1.2.1'],
    ]);
    const { evidence, regions } = read('rich');
    expect(new Set(evidence.map(([sop]) => sop))).toEqual(new Set(regions.map(({ sop }) => sop)));
    expect(read('empty').evidence).toEqual([]);
    expect(read('rich').other).toEqual([]);
    const { evidence: own, other } = read('two studies');
    expect([own.length, other.length]).toEqual([2, 2]);
    expect(new Set(other.map(([study]) => study))).toEqual(new Set(['2.25.77001.9.9']));
    const said = read('two studies without the images').texts.map(([, text]) => text);
    expect(said.some((text) => text.startsWith('The sharp series belongs to another study'))).toBe(
      true,
    );
  });

  it('reads how the patient was removed: PS3.15 annex E, CID 7050', () => {
    const clean = read('de-identified');
    expect(clean).toMatchObject({
      removed: 'YES',
      method: ['113100', '113104'],
      patient: '',
      date: '19000101',
      offset: null,
    });
    expect(clean.regions.length).toBe(8);
    expect(read('rich')).toMatchObject({ removed: null, method: [] });
  });
});

describe('the SOP Instance UID', () => {
  it('is the same for the same content, and another for another', async () => {
    const again = await documents();
    expect(Object.values(again).map(({ bytes }) => bytes)).toEqual(
      Object.values(made).map(({ bytes }) => bytes),
    );
    const uids = NAMES.map(
      (name) =>
        Buffer.from(documentOf(name).bytes.subarray(132, 400))
          .toString('latin1')
          .match(/2\.25\.\d{30,}/g)?.[0],
    );
    expect(new Set(uids).size).toBe(NAMES.length);
  });
});
