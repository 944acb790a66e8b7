import { folderArguments } from './folderArgument.js';
import type { Log } from './log.js';
import { confine, cutNetwork } from './navigation.js';
import type { ElectronParts } from './parts.js';
import { restrictPermissions } from './permissions.js';
import { OWN_SCHEME } from './protocol.js';
import { beOnlyInstance } from './singleInstance.js';
import { SWITCHES } from './switches.js';

/** What is known before the app is ready. */
export interface Beginning {
  /** Folders of the command line, absolute. */
  readonly folders: readonly string[];
  /** From now on, folders of other starts and of the system go to this function. */
  onFolders(open: (folders: readonly string[]) => void): void;
}

/**
 * Everything that must happen before Electron is ready: the lock of the only instance, the sandbox,
 * the scheme, and the rules for each session and page that will ever be made. Undefined when another
 * instance runs; it has been told, and this process must quit.
 */
export function beforeReady(
  parts: ElectronParts,
  start: {
    readonly argv: readonly string[];
    readonly cwd: string;
    /** Where Chromium and the shell keep their own files, apart from the reader's. */
    readonly userData: string;
  },
  log: Log,
): Beginning | undefined {
  const { app, protocol } = parts;
  const folders = folderArguments(start.argv, app.isPackaged, start.cwd);
  let open: ((folders: readonly string[]) => void) | undefined;
  let waiting: readonly string[] = [];
  const come = (more: readonly string[]): void => {
    if (open === undefined) waiting = [...waiting, ...more];
    else open(more);
  };

  // Before the lock, which lies in that folder.
  app.setPath('userData', start.userData);
  if (!beOnlyInstance(app, folders, app.isPackaged, come)) return undefined;

  app.enableSandbox();
  for (const [name, value] of SWITCHES) {
    if (value === '') app.commandLine.appendSwitch(name);
    else app.commandLine.appendSwitch(name, value);
  }
  protocol.registerSchemesAsPrivileged([OWN_SCHEME]);
  // macOS tells of folders dropped on the dock in this way, often before the app is ready.
  app.on('open-file', (event, path) => {
    event.preventDefault();
    come([path]);
  });
  app.on('session-created', (session) => {
    restrictPermissions(session);
    cutNetwork(session, !app.isPackaged, log);
  });
  app.on('web-contents-created', (_event, contents) => confine(contents, log));

  return {
    folders,
    onFolders: (listener) => {
      open = listener;
      const due = waiting;
      waiting = [];
      if (due.length > 0) listener(due);
    },
  };
}
