import { mkdirSync, mkdtempSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { run } from '../../../../app/cli/run.js';
import { toCsv, toHtml, toTsv, toWideCsv } from '../../../../core/report/index.js';
import { pairFiles, SHARP_SERIES, SOFT_SERIES } from '../../core/note/noteFixture.js';
import { richNote } from '../../core/note/richNote.js';

let folder = '';

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'cli-'));
});

afterEach(() => rmSync(folder, { recursive: true }));

async function cli(argv: readonly string[], signal = new AbortController().signal) {
  const out: string[] = [];
  const err: string[] = [];
  const code = await run(argv, {
    out: (text) => out.push(text),
    err: (text) => err.push(text),
    cwd: folder,
    signal,
    watched: false,
    threads: 0,
  });
  return { code, out: out.join(''), err: err.join('') };
}

function writeStudy(): void {
  mkdirSync(join(folder, 'study'));
  pairFiles().forEach((bytes, index) => {
    writeFileSync(join(folder, 'study', `i${index}`), bytes);
  });
  writeFileSync(join(folder, 'study', 'readme.txt'), 'no image');
}

function writePlan(change: object = {}): void {
  const plan = {
    plan: 1,
    pair: { soft: { seriesInstanceUid: SOFT_SERIES }, sharp: { seriesInstanceUid: SHARP_SERIES } },
    regions: [
      {
        id: 'L1',
        role: 'lumen',
        shape: { kind: 'ellipse', centreMm: [-7.5, -15, 1], radiiMm: [0.6, 1.1] },
      },
    ],
    ...change,
  };
  writeFileSync(join(folder, 'plan.json'), JSON.stringify(plan));
}

describe('index', () => {
  it('prints exactly one document with every key, null where the files are silent', async () => {
    writeStudy();
    const { code, out, err } = await cli(['index', 'study', '--json']);
    expect([code, err]).toEqual([0, '']);
    const document = JSON.parse(out);
    expect(Object.keys(document)).toEqual(['files', 'stacks', 'leftOut']);
    expect(document.files).toBe(9);
    expect(document.leftOut.map(({ file }: { file: string }) => file)).toEqual(['readme.txt']);
    const [soft] = document.stacks;
    expect(soft).toEqual({
      key: SOFT_SERIES,
      patientId: 'C-1',
      studyInstanceUid: '2.25.77001.1',
      seriesInstanceUid: SOFT_SERIES,
      frameOfReferenceUid: '2.25.77001.1.9',
      seriesNumber: 3,
      seriesDescription: 'synthetic corpus',
      kernelLabel: 'Plain',
      acquisitionNumber: null,
      phasePercent: null,
      kvp: 120,
      slices: 4,
      rows: 20,
      columns: 30,
      pixelSpacingMm: [0.5, 0.25],
      sliceSpacingMm: 1,
      thicknessMm: 0.6,
      transferSyntaxUid: soft.transferSyntaxUid,
      unit: 'HU',
      findings: soft.findings,
    });
    expect(soft.transferSyntaxUid).toMatch(/^1\.2\.840\.10008\.1\.2/);
  });

  it('prints a table for people without --json', async () => {
    writeStudy();
    const { out } = await cli(['index', 'study']);
    expect(out).toContain('9 files, 2 stacks, 1 files left out.');
    expect(out).toMatch(/1 +C-1 +3 synthetic corpus +Plain +– +4 +20 × 30 +0\.5 × 0\.25 +1 +HU/);
    expect(out).toContain('  readme.txt: ');
  });

  it('refuses a folder that is not there with one sentence', async () => {
    const { code, out, err } = await cli(['index', 'nowhere', '--json']);
    expect(code).toBe(2);
    expect(err).toBe('nowhere can’t be opened: it is not there.\n');
    expect(JSON.parse(out)).toEqual({
      error: { code: 'folder-not-opened', text: 'nowhere can’t be opened: it is not there.' },
    });
  });

  it('stops when it is interrupted', async () => {
    writeStudy();
    expect(await cli(['index', 'study'], AbortSignal.abort())).toEqual({
      code: 130,
      out: '',
      err: 'Cancelled.\n',
    });
  });
});

describe('measure', () => {
  it('measures both stacks and prints one document', async () => {
    writeStudy();
    writePlan();
    const { code, out, err } = await cli(['measure', 'plan.json', '--in', 'study', '--json']);
    expect([code, err]).toEqual([0, '']);
    const document = JSON.parse(out);
    expect(Object.keys(document)).toEqual(['regions', 'contrasts', 'profiles', 'stents']);
    // Centre on column 10: soft HU are 100 + column, and the ellipse is symmetric about it.
    expect(document.regions[0].soft.meanHu).toBeCloseTo(110, 9);
    expect(document.regions[0].sharp.sliceIndex).toBe(1);
  });

  it('tells unknown fields of the plan on standard error', async () => {
    writeStudy();
    writePlan({ contrast: [] });
    const { code, out, err } = await cli(['measure', 'plan.json', '--in', 'study', '--json']);
    expect(code).toBe(0);
    expect(err).toBe('The plan’s field contrast is not known and was ignored.\n');
    expect(() => JSON.parse(out)).not.toThrow();
  });

  it('gives null with a flag where the file of a slice was cut off, and measures the other stack', async () => {
    writeStudy();
    const shape = { kind: 'ellipse', centreMm: [-7.5, -15, 3], radiiMm: [0.6, 1.1] };
    writePlan({ regions: [{ id: 'L1', role: 'lumen', shape }] });
    const path = join(folder, 'study', 'i7');
    writeFileSync(path, readFileSync(path).subarray(0, 900));
    const { code, out } = await cli(['measure', 'plan.json', '--in', 'study', '--json']);
    const { soft, sharp } = JSON.parse(out).regions[0];
    expect(code).toBe(0);
    expect(soft.meanHu).toBeCloseTo(110, 9);
    expect(sharp.meanHu).toBeNull();
    expect(sharp.flags.map((flag: { code: string }) => flag.code)).toEqual(['no-slice-here']);
  });

  it('measures nothing on a sharp stack of another patient, says why, and ends with 1', async () => {
    writeStudy();
    const change = { 1048608: { tag: 0x00100020, vr: 'LO', value: 'C-2' } } as const;
    pairFiles(change).forEach((bytes, index) => {
      if (index >= 4) writeFileSync(join(folder, 'study', `i${index}`), bytes);
    });
    writePlan();
    const { code, out, err } = await cli(['measure', 'plan.json', '--in', 'study', '--json']);
    expect(code).toBe(1);
    expect(err).toContain('The pair: another patient: ');
    const [region] = JSON.parse(out).regions;
    expect(region.soft.meanHu).toBeTypeOf('number');
    expect([region.sharp.meanHu, region.sharp.flags[0].code]).toEqual([
      null,
      'not-one-acquisition',
    ]);
  });

  it.each([
    ['{"plan": 1', /^This is not JSON: /],
    ['{"plan": 3}', /^The plan is of version 3; /],
    ['{"plan": 1}', /^The plan can’t be read: pair is missing\.\n$/],
  ])('refuses the plan %s without a stack of calls', async (text, sentence) => {
    writeStudy();
    writeFileSync(join(folder, 'plan.json'), text);
    const { code, out, err } = await cli(['measure', 'plan.json', '--in', 'study']);
    expect([code, out]).toEqual([2, '']);
    expect(err).toMatch(sentence);
    expect(err).not.toContain('    at ');
  });

  it('refuses a series that the folder does not have', async () => {
    writeStudy();
    writePlan({ pair: { soft: { seriesInstanceUid: '1.2.3' } } });
    const { code, err } = await cli(['measure', 'plan.json', '--in', 'study']);
    expect([code, err]).toEqual([2, 'The folder has no series 1.2.3.\n']);
  });
});

describe('export', () => {
  const write = () => writeFileSync(join(folder, 'note.json'), JSON.stringify(richNote()));

  it.each([
    ['csv', [], toCsv],
    ['csv', ['--wide'], toWideCsv],
    ['tsv', [], toTsv],
    ['html', [], toHtml],
  ] as const)('writes %s %j for its owner alone', async (form, more, make) => {
    write();
    const argv = ['export', 'note.json', '--as', form, '--to', 'out', '--json', ...more];
    const { code, out, err } = await cli(argv);
    expect([code, err]).toEqual([0, '']);
    const file = join(folder, 'out');
    expect(readFileSync(file, 'utf8')).toBe(make(richNote()));
    expect(JSON.parse(out)).toEqual({
      file,
      form,
      bytes: statSync(file).size,
      deidentified: false,
    });
    if (process.platform !== 'win32') expect(statSync(file).mode & 0o777).toBe(0o600);
  });

  it.each([
    ['htm', 'out', 'There is no form “htm”. Did you mean html?\n'],
    [
      'constructor',
      'out',
      'There is no form “constructor”. There are csv, tsv, html, pdf, json and sr.\n',
    ],
    ['csv', 'note.json', 'The export would replace the note itself.\n'],
    ['csv', 'no/such/out', 'out can’t be written: it is not there.\n'],
  ])('refuses --as %s --to %s', async (form, to, sentence) => {
    write();
    const { code, err } = await cli(['export', 'note.json', '--as', form, '--to', to]);
    expect([code, err]).toEqual([2, sentence]);
  });

  it('refuses what is no note', async () => {
    writePlan();
    const { code, err } = await cli(['export', 'plan.json', '--as', 'csv', '--to', 'x']);
    expect([code, err]).toEqual([
      2,
      'This is not a reading note: it has no "format": "diptych-note".\n',
    ]);
  });
});

describe('the command line', () => {
  it.each([
    [['idnex', 'x'], 'There is no verb “idnex”. Did you mean index?\n'],
    [['zzz'], 'There is no verb “zzz”. See: diptych --help\n'],
    [['\u001b[31mx'], 'There is no verb “‹001B›[31mx”. See: diptych --help\n'],
    [['index'], 'index: DIR is missing. See: diptych index --help\n'],
    [['index', 'a', 'b'], 'index: “b” is one thing too many. See: diptych index --help\n'],
    [['measure', 'p'], 'measure: --in DIR is missing. See: diptych measure --help\n'],
    [
      ['index', 'a', '--jsn'],
      'index: there is no option --jsn. Did you mean --json? See: diptych index --help\n',
    ],
    [
      ['measure', 'p', '--in', '--json'],
      'measure: --in needs a value: --in DIR. See: diptych measure --help\n',
    ],
    [
      ['measure', 'p', '--in', 'a', '--in', 'b'],
      'measure: --in is given twice. See: diptych measure --help\n',
    ],
    [['index', 'a', '--json=1'], 'index: --json takes no value. See: diptych index --help\n'],
    [['phantom', '--to', 'x', '--slices', '-1'], '--slices is “-1”; it must be a whole number.\n'],
    [
      ['phantom', '--to', 'x', '--slices', 'many'],
      '--slices is “many”; it must be a whole number.\n',
    ],
  ])('refuses %j with exit code 2 and one sentence', async (argv, sentence) => {
    const { code, err } = await cli(argv);
    expect([code, err]).toEqual([2, sentence]);
  });

  it('does not write the phantom into a folder that holds something', async () => {
    writePlan();
    const { code, err } = await cli(['phantom', '--to', '.', '--json']);
    expect(code).toBe(2);
    expect(err).toBe(
      'The folder for the demonstration is not empty. Choose a new or an empty folder.\n',
    );
  });

  it('prints help for itself and for each verb on standard output', async () => {
    const tool = await cli(['--help']);
    expect([tool.code, tool.err]).toEqual([0, '']);
    for (const verb of ['index', 'pairs', 'measure', 'recheck', 'export', 'phantom']) {
      expect(tool.out).toContain(`\n  ${verb} `);
      const { code, out } = await cli([verb, '--help']);
      expect(code).toBe(0);
      expect(out).toContain(`Usage: diptych ${verb} `);
    }
  });

  it('prints its help on standard error when no verb is given', async () => {
    const { code, out, err } = await cli([]);
    expect([code, out]).toEqual([2, '']);
    expect(err).toContain('Usage: diptych VERB');
  });
});
