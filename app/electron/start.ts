import type { Beginning } from './beforeReady.js';
import { endProperly } from './ending.js';
import type { Log } from './log.js';
import type { ElectronParts, ShellFiles, ShellHost } from './parts.js';
import { openShell } from './shell.js';

/** Same name as in electron-builder.yml: Windows groups windows and recent folders by it. */
export const APP_ID = 'org.diptych.bench';

/** What the about panel says of the program; the same sentence as the cautions begin with. */
export const NOTICE =
  'Not a medical device. Not for primary diagnosis, treatment or emergencies. A licensed physician checks each value against the source images.';

/** Runs the shell once Electron is ready. A start that fails is told in a dialog and ends the app. */
export async function start(
  parts: ElectronParts,
  beginning: Beginning,
  makeHost: () => ShellHost,
  files: ShellFiles,
  log: Log,
): Promise<void> {
  const { app } = parts;
  try {
    await app.whenReady();
    const host = makeHost();
    app.setAppUserModelId(APP_ID);
    app.setAboutPanelOptions({
      applicationName: 'Diptych',
      applicationVersion: host.services.version,
      copyright: NOTICE,
      iconPath: files.icon,
    });
    const shell = await openShell(parts, host, files, beginning.folders, log);
    endProperly(app, shell.settled, host.services.report);
    beginning.onFolders(shell.openFromOutside);
  } catch (error) {
    const text = error instanceof Error ? (error.stack ?? error.message) : String(error);
    log(`could not start: ${text}`);
    parts.dialog.showErrorBox('Diptych could not start', text);
    app.exit(1);
  }
}
