import { closeSync, constants, fstatSync, openSync, readSync } from 'node:fs';
import { type HeaderReading, type ReadOptions, readHeader } from '../../../core/dicom/index.js';
import { fileErrorCode, fileErrorReason } from '../storage/fileError.js';

/** Size and time of change of a file when its header was read. */
export interface FileStamp {
  readonly size: number;
  readonly mtimeMs: number;
}

/** What tells a file from an earlier state of it, and from another file that took its name. */
export interface FileState extends FileStamp {
  /** Time of the last change of the file or of its attributes; no program sets it at will. */
  readonly ctimeMs: number;
  /** The file's number in its file system. */
  readonly ino: number;
}

/** What the beginning of one file tells. */
export interface FileReading {
  readonly reading: Exclude<HeaderReading, { kind: 'needMore' }>;
  /** Absent when the file could not be read: the reading then tells nothing of what it holds. */
  readonly stamp?: FileState;
}

/** How much of a file is read, bytes: most headers end in the first 8 KiB. The last step is the whole file. */
const STEPS = [8 << 10, 64 << 10, 1 << 20, 16 << 20] as const;

/** A header that does not end in this many bytes is none (and a deflated file of this size is refused). */
const MOST_BYTES = 512 << 20;

/** Not through a link, and without waiting for the other end of a pipe. Both are 0 where the system has neither. */
export const OPEN_FLAGS =
  constants.O_RDONLY | (constants.O_NOFOLLOW ?? 0) | (constants.O_NONBLOCK ?? 0);

/** Where the beginnings of files are read, one after the other: nothing of it outlives a reading. */
const SCRATCH = new Uint8Array(64 << 10);

/** Reads the header of one file, with as few bytes as will do. Blocks: call it in a worker thread. */
export function readFileHeader(path: string, options: ReadOptions = {}): FileReading {
  let descriptor: number;
  try {
    descriptor = openSync(path, OPEN_FLAGS);
  } catch (error) {
    return { reading: unreadable(error) };
  }
  try {
    const { size, mtimeMs, ctimeMs, ino } = fstatSync(descriptor);
    const reading = readSteps(descriptor, size, options);
    const failed = reading.kind === 'leftOut' && FAILED.has(reading.code);
    return failed ? { reading } : { reading, stamp: { size, mtimeMs, ctimeMs, ino } };
  } catch (error) {
    return { reading: unreadable(error) };
  } finally {
    closeSync(descriptor);
  }
}

/** Reasons to leave a file out that lie in the moment, not in what the file holds. */
const FAILED: ReadonlySet<string> = new Set(['file-shrank', 'reader-failed']);

function readSteps(descriptor: number, size: number, options: ReadOptions): FileReading['reading'] {
  if (size === 0) return leaveOut('empty-file', 'Empty file: it holds no bytes.');
  for (const step of [...STEPS, Math.min(size, MOST_BYTES)]) {
    const bytes = readStart(descriptor, Math.min(step, size));
    if (bytes.length < Math.min(step, size)) {
      return leaveOut('file-shrank', 'The file became shorter while it was read.');
    }
    const reading = readChecked(bytes, size, options);
    if (reading.kind !== 'needMore') return reading;
  }
  return leaveOut('no-header', `No image header in its ${Math.min(size, MOST_BYTES)} bytes.`);
}

/** One file that the reader stumbles over must not stop the folder; it is left out, and the text says what happened. */
function readChecked(bytes: Uint8Array, size: number, options: ReadOptions): HeaderReading {
  try {
    return readHeader(bytes, size, options);
  } catch (error) {
    return leaveOut('reader-failed', `Diptych failed to read this file (${String(error)}).`);
  }
}

function readStart(descriptor: number, length: number): Uint8Array {
  const bytes = length <= SCRATCH.length ? SCRATCH.subarray(0, length) : new Uint8Array(length);
  let filled = 0;
  while (filled < length) {
    const count = readSync(descriptor, bytes, filled, length - filled, filled);
    if (count === 0) break;
    filled += count;
  }
  return bytes.subarray(0, filled);
}

function unreadable(error: unknown): FileReading['reading'] {
  const reason = fileErrorReason(error);
  if (reason === undefined) throw error;
  switch (fileErrorCode(error)) {
    case 'ENOENT':
      return leaveOut('vanished', 'The file was gone when it was to be read.');
    case 'EACCES':
    case 'EPERM':
      return leaveOut('no-permission', 'No permission to read this file.');
    default:
      return leaveOut('unreadable-file', `The file can’t be read: ${reason}.`);
  }
}

function leaveOut(code: string, text: string): { kind: 'leftOut'; code: string; text: string } {
  return { kind: 'leftOut', code, text };
}
