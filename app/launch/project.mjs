// Where the project is, and how its steps run other programs. Plain Node: this works before anything is installed.
import { spawn, spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';

export const ROOT = fileURLToPath(new URL('../..', import.meta.url));

/** One line to the person at the terminal. Standard output belongs to the program that is started. */
export function say(line) {
  process.stderr.write(`${line}\n`);
}

/** Runs a program to its end; its output goes to standard error. Resolves to its exit code. */
export function run(command, args, options = {}) {
  return new Promise((resolve) => {
    const child = spawn(command, args, { cwd: ROOT, stdio: ['ignore', 2, 2], ...options });
    child.on('error', (error) => {
      say(`${command}: ${error.message}`);
      resolve(127);
    });
    child.on('exit', (code, signal) => resolve(code ?? (signal ? 1 : 0)));
  });
}

/** True when a program is on the path. */
export function isInstalled(program) {
  const finder = process.platform === 'win32' ? 'where' : 'which';
  return spawnSync(finder, [program], { stdio: 'ignore' }).status === 0;
}

/** Runs a JavaScript file of an installed package with this Node. */
export function runPackage(file, args, options) {
  return run(
    process.execPath,
    [fileURLToPath(new URL(`../../node_modules/${file}`, import.meta.url)), ...args],
    options,
  );
}
