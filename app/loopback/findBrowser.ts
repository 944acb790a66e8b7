import { accessSync, constants, statSync } from 'node:fs';
import { posix, win32 } from 'node:path';
import { fileErrorCode } from '../host/storage/fileError.js';

/** What the search looks at; handed in, so that every system's search is tested on any of them. */
export interface BrowserSearch {
  readonly platform: NodeJS.Platform;
  readonly environment: Readonly<Record<string, string | undefined>>;
  readonly isProgram: (path: string) => boolean;
}

const ON_PATH = [
  'chromium',
  'chromium-browser',
  'google-chrome-stable',
  'google-chrome',
  'microsoft-edge-stable',
  'microsoft-edge',
  'brave-browser',
  'brave',
  'vivaldi-stable',
  'vivaldi',
] as const;

const LINUX_PLACES = [
  '/usr/bin',
  '/usr/local/bin',
  '/snap/bin',
  '/opt/google/chrome',
  '/opt/microsoft/msedge',
  '/opt/brave.com/brave',
] as const;

const MAC_PROGRAMS = [
  'Chromium',
  'Google Chrome',
  'Microsoft Edge',
  'Brave Browser',
  'Vivaldi',
] as const;

const WINDOWS_PROGRAMS = [
  ['Google', 'Chrome', 'Application', 'chrome.exe'],
  ['Microsoft', 'Edge', 'Application', 'msedge.exe'],
  ['Chromium', 'Application', 'chrome.exe'],
  ['BraveSoftware', 'Brave-Browser', 'Application', 'brave.exe'],
  ['Vivaldi', 'Application', 'vivaldi.exe'],
] as const;

/**
 * The first Chromium-family browser of this machine: the one that DIPTYCH_BROWSER names, then those on
 * the PATH, then those in the system's usual places. Undefined when there is none.
 */
export function findBrowser(search: BrowserSearch = thisMachine()): string | undefined {
  return candidates(search).find(search.isProgram);
}

function candidates({ platform, environment }: BrowserSearch): readonly string[] {
  const chosen = environment.DIPTYCH_BROWSER;
  const first = chosen === undefined || chosen === '' ? [] : [chosen];
  if (platform === 'win32') {
    const places = ['PROGRAMFILES', 'PROGRAMFILES(X86)', 'LOCALAPPDATA'].flatMap(
      (name) => environment[name] ?? [],
    );
    const programs = WINDOWS_PROGRAMS.flatMap((program) =>
      places.map((place) => win32.join(place, ...program)),
    );
    return [...first, ...programs];
  }
  const folders = (environment.PATH ?? '').split(':').filter((folder) => folder !== '');
  const onPath = ON_PATH.flatMap((name) => folders.map((folder) => posix.join(folder, name)));
  if (platform === 'darwin') {
    const bundles = MAC_PROGRAMS.flatMap((name) =>
      ['/Applications', posix.join(environment.HOME ?? '/', 'Applications')].map((folder) =>
        posix.join(folder, `${name}.app`, 'Contents', 'MacOS', name),
      ),
    );
    return [...first, ...bundles, ...onPath];
  }
  const usual = LINUX_PLACES.flatMap((folder) =>
    ['chrome', 'msedge', ...ON_PATH].map((name) => posix.join(folder, name)),
  );
  return [...first, ...onPath, ...usual];
}

function thisMachine(): BrowserSearch {
  return { platform: process.platform, environment: process.env, isProgram };
}

function isProgram(path: string): boolean {
  try {
    accessSync(path, constants.X_OK);
    return statSync(path).isFile();
  } catch (error) {
    if (fileErrorCode(error) === undefined) throw error;
    return false;
  }
}
