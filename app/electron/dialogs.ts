import { dirname, join } from 'node:path';
import type {
  BrowserWindow,
  MessageBoxOptions,
  MessageBoxReturnValue,
  OpenDialogOptions,
  OpenDialogReturnValue,
  SaveDialogOptions,
  SaveDialogReturnValue,
} from 'electron';
import writeFileAtomic from 'write-file-atomic';
import { fileErrorReason } from '../host/storage/fileError.js';
import type { LastFolders } from './lastFolders.js';
import { safeFileName, splitName } from './saveName.js';

/** The parts of Electron's dialog module that are used; all are sheets of the window. */
export interface DialogPart {
  showOpenDialog(window: BrowserWindow, options: OpenDialogOptions): Promise<OpenDialogReturnValue>;
  showSaveDialog(window: BrowserWindow, options: SaveDialogOptions): Promise<SaveDialogReturnValue>;
  showMessageBox(window: BrowserWindow, options: MessageBoxOptions): Promise<MessageBoxReturnValue>;
}

/** Asks for a folder of images; undefined when the reader cancelled. */
export async function askForFolder(
  dialog: DialogPart,
  window: BrowserWindow,
  last: LastFolders,
): Promise<string | undefined> {
  const start = last.get('study');
  const answer = await dialog.showOpenDialog(window, {
    title: 'Open folder',
    message: 'Choose the folder that holds both reconstructions',
    buttonLabel: 'Open',
    properties: ['openDirectory'],
    ...(start === undefined ? {} : { defaultPath: start }),
  });
  const [folder] = answer.filePaths;
  if (answer.canceled || folder === undefined) return undefined;
  // Two studies lie side by side more often than one inside the other.
  await last.set('study', dirname(folder));
  return folder;
}

/**
 * Saves bytes where the reader says. False when the reader cancelled, and when the file could not
 * be written: then the reader has been told so by the dialog.
 */
export async function saveAs(
  dialog: DialogPart,
  window: BrowserWindow,
  last: LastFolders,
  name: string,
  bytes: Uint8Array,
): Promise<boolean> {
  const proposed = safeFileName(name);
  const extension = splitName(proposed).extension.slice(1);
  const start = last.get('export');
  const answer = await dialog.showSaveDialog(window, {
    title: 'Save export',
    defaultPath: start === undefined ? proposed : join(start, proposed),
    properties: ['createDirectory', 'showOverwriteConfirmation'],
    ...(extension === ''
      ? {}
      : { filters: [{ name: extension.toUpperCase(), extensions: [extension] }] }),
  });
  if (answer.canceled || answer.filePath === '') return false;
  try {
    await writeFileAtomic(answer.filePath, Buffer.from(bytes));
  } catch (error) {
    await tell(dialog, window, 'The file could not be saved', writeFault(error));
    return false;
  }
  await last.set('export', dirname(answer.filePath));
  return true;
}

/** Tells the reader one thing, as a sheet with one button. */
export async function tell(
  dialog: DialogPart,
  window: BrowserWindow,
  message: string,
  detail: string,
): Promise<void> {
  await dialog.showMessageBox(window, {
    type: 'warning',
    message,
    detail,
    buttons: ['OK'],
    noLink: true,
  });
}

/** Why writing failed, as a sentence; what is no failure of writing is our own mistake, thrown on. */
function writeFault(error: unknown): string {
  const reason = fileErrorReason(error);
  if (reason === undefined) throw error;
  return `The system refused to write it: ${reason}. Choose another place and save again.`;
}
