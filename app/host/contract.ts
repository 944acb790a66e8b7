import type { Finding } from '../../core/result.js';
import type { FolderIndex } from '../../core/stack/index.js';

/** A folder that the reader has opened. The page knows it by its grant only, never by its path. */
export interface OpenFolder {
  readonly grant: string;
  /** Name of the folder, for the header and the title. */
  readonly name: string;
}

export interface RecentFolder {
  readonly id: string;
  readonly name: string;
  /** The folder is not there at the moment. */
  readonly missing: boolean;
}

export interface Settings {
  /** The cautions were read and accepted on this machine. */
  readonly cautionsAccepted: boolean;
  readonly theme: 'system' | 'dark' | 'light';
  /** Single letters as keys; switched off for those whom they disturb (WCAG 2.1.4). */
  readonly letterKeys: boolean;
  /** Name that the reader's notes carry. */
  readonly reader: string;
}

/** What the page learns at start. */
export interface Session {
  readonly version: string;
  /** In the order of opening; the last one is the one to show. */
  readonly folders: readonly OpenFolder[];
  readonly recent: readonly RecentFolder[];
  readonly settings: Settings;
  /** No folder was given: the page asks for the demonstration study. */
  readonly openDemonstration?: boolean;
  /** What the reader should know at start: settings that could not be read, for instance. */
  readonly remarks?: readonly Finding[];
}

/** One level of the folder chooser of the browser shell: names of folders only. */
export interface FolderLevel {
  readonly id: string;
  readonly name: string;
  /** From the root down to this folder. */
  readonly trail: readonly { readonly id: string; readonly name: string }[];
  readonly children: readonly { readonly id: string; readonly name: string }[];
  /** Places to start from: the home folder, the root, drives, mounted media. */
  readonly roots?: readonly { readonly id: string; readonly name: string }[];
  readonly refusal?: string;
}

/** A stored note of a study, without its content. */
export interface ListedNote {
  readonly reader: string;
  readonly completion: 'PARTIAL' | 'COMPLETE';
  readonly verification: 'UNVERIFIED' | 'VERIFIED';
  readonly changedAt: string;
  readonly regions: number;
}

/** What a long job says while it runs, as server-sent events named 'progress', 'done' and 'failed'. */
export interface Progress {
  readonly done: number;
  /** Undefined while the amount of work is not known yet. */
  readonly total?: number;
  readonly text: string;
}

export interface JobFailure {
  readonly code: string;
  readonly text: string;
}

export type { FolderIndex };

/** What a shell can do that a page can't. The Electron shell exposes it; the browser shell has its own version. */
export interface ShellBridge {
  /** Ask for a folder with the system's dialog. */
  chooseFolder(): Promise<OpenFolder | undefined>;
  /** Turn a dropped folder into a grant. */
  openDropped(file: unknown): Promise<OpenFolder | undefined>;
  /** Save bytes under a name of the reader's choice; false when the reader cancelled. */
  saveFile(name: string, bytes: Uint8Array): Promise<boolean>;
  /** A command of the menu was chosen. Returns an unsubscribe function. */
  onCommand(listener: (command: string) => void): () => void;
  /** A folder was opened from outside: another start, the dock, the recent list. */
  onFolder(listener: (folder: OpenFolder) => void): () => void;
  /** Which commands can be used now, and whether something is not saved yet. */
  reportState(state: ShellState): void;
}

export interface ShellState {
  readonly enabled: readonly string[];
  readonly checked: readonly string[];
  readonly unsaved: boolean;
  readonly title: string;
}
