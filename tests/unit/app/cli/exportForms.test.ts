import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { nodeDigest } from '../../../../app/cli/nodeDigest.js';
import { run } from '../../../../app/cli/run.js';
import { checkSeal } from '../../../../core/note/life/index.js';
import { exportFileName } from '../../../../core/report/index.js';
import { tellingNote } from '../../core/report/sr/tellingNote.js';

let folder = '';
beforeEach(async () => {
  folder = mkdtempSync(join(tmpdir(), 'export-'));
  const note = { ...(await tellingNote()), later: { field: 'kept' } };
  writeFileSync(join(folder, 'note.json'), JSON.stringify(note));
});
afterEach(() => rmSync(folder, { recursive: true }));

async function cli(...argv: readonly string[]) {
  const [out, err]: [string[], string[]] = [[], []];
  const code = await run(['export', 'note.json', '--to', 'out', ...argv], {
    out: (text) => out.push(text),
    err: (text) => err.push(text),
    cwd: folder,
    signal: new AbortController().signal,
    watched: false,
    threads: 0,
  });
  return { code, out: out.join(''), err: err.join('') };
}

describe('export', () => {
  it('writes JSON with identity as the note stands in its file: unknown fields and seal are kept', async () => {
    expect((await cli('--as', 'json')).code).toBe(0);
    const written: unknown = JSON.parse(readFileSync(join(folder, 'out'), 'utf8'));
    expect(written).toEqual(JSON.parse(readFileSync(join(folder, 'note.json'), 'utf8')));
    // The seal was made without the field 'later': it is as good or bad as that of the file itself.
    expect(await checkSeal(written, nodeDigest)).toBe('changed');
    const { later: _later, ...sealed } = written as Record<string, unknown>;
    expect(await checkSeal(sealed, nodeDigest)).toBe('intact');
  });

  it('leaves a field that it does not know out of JSON without identity', async () => {
    expect((await cli('--as', 'json', '--deidentify')).code).toBe(0);
    expect(readFileSync(join(folder, 'out'), 'utf8')).not.toContain('later');
  });

  it('writes a structured report as a DICOM file', async () => {
    const { code, out } = await cli('--as', 'sr', '--json');
    expect(code).toBe(0);
    const bytes = readFileSync(join(folder, 'out'));
    // PS3.10 7.1: a preamble of 128 bytes, then DICM.
    expect(bytes.subarray(128, 132).toString('latin1')).toBe('DICM');
    expect(JSON.parse(out)).toMatchObject({ form: 'sr', bytes: bytes.length, deidentified: false });
  });

  it.each([
    [['--as', 'csv', '--in', '.'], 'export: --in goes with --as html, pdf and sr only.'],
    [['--as', 'csv', '--salt', 'salt'], '--salt goes with --deidentify only.'],
    [['--as', 'sr', '--wide'], '--wide goes with --as csv only.'],
    [['--as', 'sr', '--in', 'nowhere'], 'nowhere'],
    [['--as', 'csv', '--deidentify', '--salt', 'salt'], 'a salt needs 16 or more of chance.'],
    [['--as', 'csv', '--deidentify', '--salt', 'none'], 'none can’t be read'],
  ])('refuses %j', async (argv, sentence) => {
    writeFileSync(join(folder, 'salt'), 'short');
    const { code, err } = await cli(...argv);
    expect([code, err]).toEqual([2, expect.stringContaining(sentence.replace('export: ', ''))]);
  });
});

describe('exportFileName', () => {
  it('says the day of the reading, and of a de-identified note not even that', () => {
    const changedAt = '2026-01-05T09:30:00.000Z';
    expect(exportFileName({ changedAt }, 'sr')).toBe('reading-note-2026-01-05.dcm');
    expect(exportFileName({ changedAt: '', deidentified: [] }, 'csv')).toBe(
      'reading-note-deidentified.csv',
    );
    expect(exportFileName({ changedAt: 'x/../y' }, 'pdf')).toBe('reading-note-undated.pdf');
  });
});
