import { execFileSync } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, type Page } from '@playwright/test';
import { packageRoot } from '../../../app/host/packageRoot.js';

/** Forms of the export dialog and of the command line, by the words of the dialog. */
export const FORMS = [
  { words: 'PDF', form: 'pdf', flags: [] },
  { words: 'HTML page', form: 'html', flags: [] },
  { words: 'DICOM structured report', form: 'sr', flags: [] },
  { words: 'CSV, long', form: 'csv', flags: [] },
  { words: 'CSV, wide', form: 'csv', flags: ['--wide'] },
  { words: 'TSV', form: 'tsv', flags: [] },
  { words: 'The note itself, JSON', form: 'json', flags: [] },
] as const;

/** Exports one form from the window's dialog, which is open; gives the file's bytes. */
export async function exportFromWindow(page: Page, words: string): Promise<Buffer> {
  const dialog = page.getByRole('dialog', { name: 'Export' });
  await dialog.getByRole('radio', { name: words }).check();
  const download = page.waitForEvent('download', { timeout: 60_000 });
  await dialog.getByRole('button', { name: 'Export', exact: true }).click();
  const bytes = readFileSync(await (await download).path());
  await expect(dialog.getByRole('status')).toContainText('Exported as reading-note-');
  return bytes;
}

/** Runs the built command line; gives its exit code's success and what it printed. */
export function diptych(args: readonly string[], cwd: string): string {
  return execFileSync(process.execPath, [join(packageRoot(), 'dist/app/cli.js'), ...args], {
    cwd,
    encoding: 'utf8',
  });
}

/**
 * The text of an export without what differs from one export to the next: the moment it was made. PDF and structured
 * reports are read by Poppler and dcmtk; undefined where these are missing.
 */
export function textOf(form: string, path: string): string | undefined {
  if (form === 'pdf') return tool('/usr/bin/pdftotext', ['-layout', path, '-']);
  if (form !== 'sr') return readFileSync(path, 'utf8');
  const text = tool('/usr/bin/dsrdump', ['+Pc', path]);
  return text
    ?.split('\n')
    .filter((line) => !/Content Date\/Time|SOP Instance|Series Instance|\d{14}/.test(line))
    .join('\n');
}

function tool(path: string, args: readonly string[]): string | undefined {
  return existsSync(path) ? execFileSync(path, [...args], { encoding: 'utf8' }) : undefined;
}
