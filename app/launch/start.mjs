// npm start [-- FOLDER]: installs what is missing, builds, and opens the application.
import { spawn } from 'node:child_process';
import { join } from 'node:path';
import { ensureBuilt } from './builder.mjs';
import { electronBinary, fetchElectronBinary } from './electronBinary.mjs';
import { ensurePackages } from './packages.mjs';
import { ROOT, say } from './project.mjs';
import { ensureBrowser } from './systemTools.mjs';

await ensurePackages();
if (!(await ensureBuilt())) process.exit(2);

const args = process.argv.slice(2);
const hasDisplay =
  process.platform !== 'linux' || Boolean(process.env.DISPLAY || process.env.WAYLAND_DISPLAY);
const electron = hasDisplay ? (electronBinary() ?? (await fetchElectronBinary())) : undefined;

if (electron !== undefined) {
  open(electron, [ROOT, ...args]);
} else {
  if (hasDisplay) {
    say('The Electron binary is not here and could not be fetched: opening in the browser shell.');
    await ensureBrowser();
  }
  open(process.execPath, [join(ROOT, 'dist', 'app', 'loopback.js'), ...args]);
}

function open(program, programArgs) {
  const child = spawn(program, programArgs, {
    stdio: 'inherit',
    cwd: process.env.INIT_CWD ?? ROOT,
  });
  for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => child.kill(signal));
  child.on('exit', (code) => process.exit(code ?? 0));
}
