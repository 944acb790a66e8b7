import type { Note } from '../../core/note/index.js';
import { exportFileName, toClipboardHtml, toCsv, toHtml, toTsv } from '../../core/report/index.js';
import type { Shell } from '../host/shell.js';
import type { Message } from '../state/appState.js';

export type ExportKind = 'csv' | 'html' | 'json';

const WRITERS: Readonly<Record<ExportKind, (note: Note) => string>> = {
  csv: toCsv,
  html: (note) => toHtml(note),
  json: (note) => `${JSON.stringify(note, null, 2)}\n`,
};

/** Saves an export under a name without anything of the patient; what to tell the reader. */
export async function exportNote(note: Note, kind: ExportKind, shell: Shell): Promise<Message> {
  const name = exportFileName(note, kind);
  const bytes = new TextEncoder().encode(WRITERS[kind](note));
  const saved = await shell.saveFile(name, bytes);
  if (!saved) return { tone: 'plain', text: 'Nothing was exported.' };
  return shell.kind === 'browser'
    ? { tone: 'plain', text: `Exported as ${name}. The browser keeps it with its downloads.` }
    : { tone: 'plain', text: 'Exported.' };
}

/** Puts the table on the clipboard, as text for spreadsheets and as a table for word processors. */
export async function copyTable(note: Note, clipboard: Clipboard | undefined): Promise<Message> {
  if (clipboard === undefined) return { tone: 'warning', text: NOT_COPIED };
  try {
    await clipboard.write([
      new ClipboardItem({
        'text/plain': new Blob([toTsv(note)], { type: 'text/plain' }),
        'text/html': new Blob([toClipboardHtml(note)], { type: 'text/html' }),
      }),
    ]);
    return { tone: 'plain', text: 'The table is on the clipboard.' };
  } catch (error) {
    if (error instanceof DOMException) return { tone: 'warning', text: NOT_COPIED };
    throw error;
  }
}

const NOT_COPIED =
  'The table could not be copied: the clipboard was refused. Export it as CSV instead.';
