import { spawn } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { packageRoot } from '../../../app/host/packageRoot.js';

const ROOT = packageRoot();

/** A running browser shell, without its window. */
export interface RunningShell {
  readonly address: string;
  stop(): Promise<void>;
}

/** A folder for notes, settings and the demonstration study, removed at the end. */
export function temporaryHome(): { readonly path: string; remove(): void } {
  const path = mkdtempSync(join(tmpdir(), 'diptych-e2e-'));
  return { path, remove: () => rmSync(path, { recursive: true, force: true }) };
}

/** Starts the built browser shell as npm start does with no display, and waits for its address. */
export async function startShell(home: string, folder?: string): Promise<RunningShell> {
  const child = spawn(
    process.execPath,
    [join(ROOT, 'dist/app/loopback.js'), ...(folder === undefined ? [] : [folder]), '--no-window'],
    { env: { ...process.env, DIPTYCH_HOME: home }, stdio: ['ignore', 'pipe', 'inherit'] },
  );
  const ended = new Promise<void>((done) => child.once('exit', () => done()));
  const address = await new Promise<string>((found, failed) => {
    let printed = '';
    child.stdout.setEncoding('utf8').on('data', (text: string) => {
      printed += text;
      const match = /http:\/\/127\.0\.0\.1:\d+\/#\S+/.exec(printed);
      if (match !== null) found(match[0]);
    });
    child.once('exit', (code) => failed(new Error(`the shell ended with ${code}: ${printed}`)));
  });
  return {
    address,
    stop: async () => {
      child.kill('SIGTERM');
      await ended;
    },
  };
}
