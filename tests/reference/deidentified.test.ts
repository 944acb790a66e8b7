import { mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { run } from '../../app/cli/run.js';
import { pythonHas, pythonJson } from '../support/python.js';
import { pairFiles } from '../unit/core/note/noteFixture.js';
import { TELLING, tellingNote } from '../unit/core/report/sr/tellingNote.js';

const folder = mkdtempSync(join(tmpdir(), 'deidentified-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const hasPydicom = pythonHas('pydicom');

/** Root of every UID in the fixture's files. */
const UID_ROOT = '2.25.77001';

beforeAll(async () => {
  mkdirSync(join(folder, 'study'));
  pairFiles().forEach((bytes, index) => {
    writeFileSync(join(folder, 'study', `i${index}`), bytes);
  });
  writeFileSync(join(folder, 'note.json'), JSON.stringify(await tellingNote()));
  writeFileSync(join(folder, 'salt'), 'a salt of this test alone\n');
});

async function exported(form: string, ...more: readonly string[]): Promise<Buffer> {
  const argv = ['export', 'note.json', '--as', form, '--to', 'out', ...more];
  const said: string[] = [];
  const code = await run(argv, {
    out: (text) => said.push(text),
    err: (text) => said.push(text),
    cwd: folder,
    signal: new AbortController().signal,
    watched: false,
    threads: 0,
  });
  expect([code, said.at(-1)]).toEqual([
    0,
    expect.stringContaining(more.includes('--deidentify') ? 'without identity' : 'with identity'),
  ]);
  return readFileSync(join(folder, 'out'));
}

/** The bytes that a value would have in the encodings of these forms: UTF-8, Latin 1, UTF-16, JSON and HTML escapes. */
function encodingsOf(value: string): readonly Buffer[] {
  const points = [...value];
  const jsonEscaped = [...Array(value.length).keys()]
    .map((at) => value.charCodeAt(at))
    .map((unit) =>
      unit < 128 ? String.fromCharCode(unit) : `\\u${unit.toString(16).padStart(4, '0')}`,
    )
    .join('');
  const htmlEscaped = points
    .map((point) => ((point.codePointAt(0) ?? 0) < 128 ? point : `&#${point.codePointAt(0)};`))
    .join('');
  const utf16 = Buffer.from(value, 'utf16le');
  return [
    Buffer.from(value, 'utf8'),
    Buffer.from(value, 'latin1'),
    utf16,
    Buffer.from(utf16).swap16(),
    Buffer.from(jsonEscaped),
    Buffer.from(htmlEscaped),
  ];
}

/** The telling values that stand somewhere in a file; ASCII letters of either case. */
function foundIn(file: Buffer): readonly string[] {
  const lower = (bytes: Buffer) =>
    Buffer.from(bytes.map((byte) => (byte >= 65 && byte <= 90 ? byte + 32 : byte)));
  const searched = lower(file);
  return [...TELLING, UID_ROOT].filter((value) =>
    encodingsOf(value).some((bytes) => searched.includes(lower(bytes))),
  );
}

const FORMS = [
  ['csv', []],
  ['csv', ['--wide']],
  ['tsv', []],
  ['html', []],
  ['json', []],
  ['sr', []],
  ['sr', ['--in', 'study']],
] as const;

describe('an export without identity', () => {
  it.each(FORMS)(
    'as %s %j holds no telling value in any encoding, and says what was done',
    async (form, more) => {
      const file = await exported(form, ...more, '--deidentify');
      expect(foundIn(file)).toEqual([]);
      expect(file.includes('Basic Application Confidentiality Profile')).toBe(true);
      expect(file.length).toBeGreaterThan(1000);
      // Contours are looked up under the files' own UIDs, and written under the new ones.
      expect(file.includes('ELLIPSE')).toBe(more.some((one) => one === '--in'));
    },
  );

  it('is searched by a search that does find: with identity each form tells', async () => {
    expect(foundIn(await exported('sr', '--in', 'study'))).toEqual(
      expect.arrayContaining(['Quillfeather', '山田', 'PX-77123', '20250917', 'Fernsby', UID_ROOT]),
    );
    const csv = foundIn(await exported('csv'));
    expect(csv).toEqual(expect.arrayContaining(['Quillfeather', '1961-11-24', UID_ROOT]));
    // JSON is the note itself: only dates as the exports format them are not in it.
    const json = foundIn(await exported('json'));
    expect(TELLING.filter((value) => !json.includes(value))).toEqual([
      '1961-11-24',
      '2025-09-17',
      '20260105',
    ]);
  });

  it('has the same UIDs in every form under one salt, and others under chance', async () => {
    const uids = async (form: string, ...more: readonly string[]) =>
      new Set(
        (await exported(form, '--deidentify', ...more))
          .toString('latin1')
          .match(/2\.25\.\d{36,39}/g),
      );
    const json = await uids('json', '--salt', 'salt');
    expect(json.size).toBeGreaterThan(6);
    for (const form of ['csv', 'html', 'sr']) {
      const others = await uids(form, '--salt', 'salt');
      expect([...json].filter((uid) => others.has(uid)).length).toBeGreaterThan(4);
    }
    const chance = await uids('json');
    expect([...json].filter((uid) => chance.has(uid))).toEqual([]);
  });

  it.skipIf(!hasPydicom)(
    'read back with pydicom, no element has an original value (skipped without it)',
    async () => {
      await exported('sr', '--deidentify', '--in', 'study');
      const elements = pythonJson(
        `
import json, sys, pydicom
found = []
def walk(ds):
    for e in ds:
        if e.VR == 'SQ':
            for item in e.value: walk(item)
        else: found.append([e.keyword, e.VR, str(e.value)])
ds = pydicom.dcmread(sys.argv[1])
walk(ds.file_meta); walk(ds)
print(json.dumps(found))`,
        [join(folder, 'out')],
      ) as readonly (readonly [string, string, string])[];
      expect(elements.length).toBeGreaterThan(1000);
      const told = [...TELLING, UID_ROOT].map((value) => value.toLowerCase());
      expect(
        elements.filter(([, , value]) => told.some((one) => value.toLowerCase().includes(one))),
      ).toEqual([]);
      // PS3.15 table E.1-1: no name of a person, and no date but the dummy, is left.
      const people = elements.filter(([, vr]) => vr === 'PN').map(([, , value]) => value);
      expect(new Set(people)).toEqual(new Set(['']));
      const dates = elements
        .filter(([, vr]) => ['DA', 'DT'].includes(vr))
        .map(([, , value]) => value);
      expect(new Set(dates)).toEqual(new Set(['', '19000101']));
      // No private attribute: every tag has a keyword of the dictionary.
      expect(elements.filter(([keyword]) => keyword === '')).toEqual([]);
    },
  );
});
