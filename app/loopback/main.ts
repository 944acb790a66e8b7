import { join, resolve } from 'node:path';
import { createServices } from '../host/createServices.js';
import { packageRoot } from '../host/packageRoot.js';
import { ensureDemonstration } from '../host/phantom/ensureDemonstration.js';
import { fileErrorReason } from '../host/storage/fileError.js';
import { userFolders } from '../host/userFolders.js';
import { findBrowser } from './findBrowser.js';
import { hasDisplay } from './hasDisplay.js';
import { parseArguments, USAGE } from './parseArguments.js';
import { sweepProfiles } from './profiles.js';
import { runShell } from './runShell.js';

const say = (line: string): boolean => process.stdout.write(`${line}\n`);
const complain = (line: string): boolean => process.stderr.write(`${line}\n`);

process.exit(await main(process.argv.slice(2)));

/** The browser shell from its start to its end. Resolves to the exit code: 0 done, 1 no page came, 2 bad usage or input. */
async function main(words: readonly string[]): Promise<number> {
  const read = parseArguments(words);
  if (!read.ok) {
    complain(read.refusal.text);
    return 2;
  }
  const { folder, help, port } = read.value;
  if (help) {
    say(USAGE);
    return 0;
  }
  const services = createServices({
    folders: userFolders(),
    rendererDirectory: join(packageRoot(), 'dist', 'renderer'),
    ensureDemonstration,
  });
  if (folder !== undefined) {
    const opened = await services.openFolder(resolve(folder));
    if (!opened.ok) {
      complain(opened.refusal.text);
      return 2;
    }
  }
  const stop = new AbortController();
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) {
    process.once(signal, () => stop.abort());
  }
  await sweepLeftovers();
  const browser = read.value.window && hasDisplay() ? findBrowser() : undefined;
  if (read.value.window && hasDisplay() && browser === undefined) {
    complain(
      'No Chromium-family browser was found. Open the address below in one, or name its program in DIPTYCH_BROWSER.',
    );
  }
  const reason = await runShell({
    services,
    port,
    say,
    signal: stop.signal,
    openDemonstration: folder === undefined,
    ...(browser === undefined ? {} : { browser }),
  });
  if (reason !== 'no page came') return 0;
  complain(
    'The browser did not ask for the page within a minute, so Diptych ended. Start it again.',
  );
  return 1;
}

/** A folder for temporary files that can't be swept does not keep the program from starting. */
async function sweepLeftovers(): Promise<void> {
  try {
    await sweepProfiles();
  } catch (error) {
    const reason = fileErrorReason(error);
    if (reason === undefined) throw error;
    complain(`Old browser profiles were not removed: ${reason}.`);
  }
}
