import type { Result } from '../../core/result.js';
import type { OpenFolder, Progress } from './contract.js';
import type { FolderChooser } from './folders/chooser.js';
import type { Grants } from './folders/grants.js';
import type { Recents } from './folders/recents.js';
import type { Library } from './library/library.js';
import type { NotesStore } from './notes/notesStore.js';
import type { PageFiles } from './pageFiles.js';
import type { Presence } from './presence.js';
import type { SettingsStore } from './settings.js';

/** How a long job tells where it stands, and how it is told to stop. */
export interface JobOptions {
  readonly onProgress?: (progress: Progress) => void;
  readonly signal?: AbortSignal;
}

/** Writes the demonstration study where it is not there yet, and says in which folder it lies. */
export type EnsureDemonstration = (
  dataDirectory: string,
  options: JobOptions,
) => Promise<Result<{ readonly folder: string }>>;

/** Everything that stands behind the request handler. A shell makes one set of it at start. */
export interface Services {
  readonly version: string;
  readonly grants: Grants;
  readonly recents: Recents;
  readonly settings: SettingsStore;
  readonly notes: NotesStore;
  readonly library: Library;
  readonly chooser: FolderChooser;
  readonly pages: PageFiles;
  readonly presence: Presence;
  /** Grants a folder and puts it first in the list of recent folders. */
  openFolder(path: string): Promise<Result<OpenFolder>>;
  /** Makes the demonstration study if need be and grants its folder. It is not put among the recent ones. */
  openDemonstration(options: JobOptions): Promise<Result<OpenFolder>>;
  /** Tells the one who runs the program of a mistake of the program itself. */
  report(error: unknown): void;
  /** Resolves when everything that was to be written is on the disk. */
  settled(): Promise<void>;
}
