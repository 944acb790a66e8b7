import { mkdtemp, readFile, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { BrowserWindow } from 'electron';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { askForFolder, type DialogPart, saveAs } from '../../../../app/electron/dialogs.js';
import { type LastFolders, lastFolders } from '../../../../app/electron/lastFolders.js';
import { safeFileName, splitName } from '../../../../app/electron/saveName.js';

let folder: string;
let last: LastFolders;
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'diptych-dialogs-'));
  last = await lastFolders(folder);
});
afterEach(() => rm(folder, { recursive: true, force: true }));

const WINDOW = {} as BrowserWindow;

/** A dialog that answers as told and remembers what it was asked. */
function dialog(answers: { readonly folder?: string; readonly file?: string }) {
  const asked: Record<string, unknown>[] = [];
  const told: string[] = [];
  const part: DialogPart = {
    showOpenDialog: async (_window, options) => {
      asked.push({ ...options });
      const { folder: chosen } = answers;
      return { canceled: chosen === undefined, filePaths: chosen === undefined ? [] : [chosen] };
    },
    showSaveDialog: async (_window, options) => {
      asked.push({ ...options });
      return { canceled: answers.file === undefined, filePath: answers.file ?? '' };
    },
    showMessageBox: async (_window, options) => {
      told.push(`${options.message}: ${options.detail}`);
      return { response: 0, checkboxChecked: false };
    },
  };
  return { part, asked, told };
}

describe('askForFolder', () => {
  it('asks for one folder, and next time starts beside it', async () => {
    const { part, asked } = dialog({ folder: '/studies/one' });
    expect(await askForFolder(part, WINDOW, last)).toBe('/studies/one');
    await askForFolder(part, WINDOW, last);
    expect(asked[0]).toMatchObject({ properties: ['openDirectory'] });
    expect(asked[0]).not.toHaveProperty('defaultPath');
    expect(asked[1]).toMatchObject({ defaultPath: '/studies' });
  });

  it('answers nothing and remembers nothing when cancelled', async () => {
    expect(await askForFolder(dialog({}).part, WINDOW, last)).toBeUndefined();
    expect(last.get('study')).toBeUndefined();
  });
});

describe('saveAs', () => {
  const bytes = new TextEncoder().encode('a,b\n');

  it('writes the bytes where the reader says, and next time starts there', async () => {
    const file = join(folder, 'table.csv');
    const { part, asked, told } = dialog({ file });
    expect(await saveAs(part, WINDOW, last, 'table.csv', bytes)).toBe(true);
    expect(await readFile(file, 'utf8')).toBe('a,b\n');
    expect(asked[0]).toMatchObject({
      defaultPath: 'table.csv',
      filters: [{ name: 'CSV', extensions: ['csv'] }],
    });
    await saveAs(part, WINDOW, last, '../../other.html', bytes);
    expect(asked[1]).toMatchObject({ defaultPath: join(folder, '-..-other.html') });
    expect(told).toEqual([]);
  });

  it('writes a part of a larger buffer as that part', async () => {
    const file = join(folder, 'part.json');
    const part = new Uint8Array(new TextEncoder().encode('xx{}xx').buffer, 2, 2);
    expect(await saveAs(dialog({ file }).part, WINDOW, last, 'part.json', part)).toBe(true);
    expect(await readFile(file, 'utf8')).toBe('{}');
  });

  it('is false when the reader cancels', async () => {
    expect(await saveAs(dialog({}).part, WINDOW, last, 'a.csv', bytes)).toBe(false);
  });

  it('says why when the file can’t be written, and is false', async () => {
    const { part, told } = dialog({ file: join(folder, 'missing', 'a.csv') });
    expect(await saveAs(part, WINDOW, last, 'a.csv', bytes)).toBe(false);
    expect(told).toEqual([
      'The file could not be saved: The system refused to write it: it is not there. Choose another place and save again.',
    ]);
    expect(last.get('export')).toBeUndefined();
  });
});

describe('safeFileName', () => {
  it.each([
    ['table.csv', 'table.csv'],
    ['Messtabelle – Übersicht.html', 'Messtabelle – Übersicht.html'],
    ['a/b\\c:d.csv', 'a-b-c-d.csv'],
    ['../../etc/passwd', '-..-etc-passwd'],
    ['line\nbreak\u0000.csv', 'linebreak.csv'],
    // U+202E would show "exe.csv" as "vsc.exe" (Unicode Technical Report 36, 3.3, from memory).
    ['table\u202ecsv.exe', 'tablecsv.exe'],
    ['  .hidden. ', 'hidden'],
    ['', 'export'],
    ['...', 'export'],
    ['.csv', 'csv'],
    // Names of devices: Microsoft, "Naming Files, Paths, and Namespaces".
    ['CON.csv', '_CON.csv'],
    ['lpt1', '_lpt1'],
    ['console.csv', 'console.csv'],
  ])('%j → %j', (proposed, expected) => expect(safeFileName(proposed)).toBe(expected));

  it('keeps the extension of a name that is cut to 120 characters', () => {
    const name = safeFileName(`${'x'.repeat(200)}.json`);
    expect(name).toHaveLength(120);
    expect(name.endsWith('x.json')).toBe(true);
  });
});

describe('splitName', () => {
  it.each([
    ['a.csv', 'a', '.csv'],
    ['a.b.json', 'a.b', '.json'],
    ['plain', 'plain', ''],
    ['Dr. Alder', 'Dr. Alder', ''],
  ])('%s', (name, stem, extension) => expect(splitName(name)).toEqual({ stem, extension }));
});
