import { mkdir, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { createServices } from '../../../../app/host/createServices.js';
import { createHandler, type Handler, type HandlerOptions } from '../../../../app/host/handler.js';
import type { EnsureDemonstration, Services } from '../../../../app/host/services.js';
import { refuse } from '../../../../core/result.js';
import { ctSlice } from '../../../corpus/ctSlice.js';
import { temporaryFolder } from './temporaryFolder.js';

/** A host on a folder of its own. */
export interface HostForTest {
  readonly home: string;
  readonly services: Services;
  readonly handler: Handler;
  /** Mistakes that were reported; a test that expects none checks that it is empty. */
  readonly reported: unknown[];
  ask(path: string, init?: RequestInit): Promise<Response>;
}

const ORIGIN = 'http://127.0.0.1:1';

/** A host with a built page of two files, which reads headers in this thread. */
export async function hostForTest(
  options: HandlerOptions & { readonly ensureDemonstration?: EnsureDemonstration } = {},
): Promise<HostForTest> {
  const home = await temporaryFolder();
  const rendererDirectory = join(home, 'page');
  await mkdir(join(rendererDirectory, 'assets'), { recursive: true });
  await writeFile(join(rendererDirectory, 'index.html'), '<!doctype html><title>Page</title>');
  await writeFile(join(rendererDirectory, 'assets', 'index-1.js'), 'export {};');
  const reported: unknown[] = [];
  const services = createServices({
    folders: { data: join(home, 'data'), config: join(home, 'config'), cache: join(home, 'cache') },
    rendererDirectory,
    home,
    threads: 0,
    report: (error) => reported.push(error),
    ensureDemonstration:
      options.ensureDemonstration ?? (async () => refuse('none', 'No demonstration in this test.')),
  });
  const handler = createHandler(services, options);
  const ask = (path: string, init?: RequestInit): Promise<Response> =>
    handler(new Request(`${ORIGIN}${path}`, init));
  return { home, services, handler, reported, ask };
}

/** Writes a folder of three synthetic slices; returns its path. */
export async function studyFolder(home: string): Promise<string> {
  const folder = join(home, 'study');
  await mkdir(folder);
  for (const number of [1, 2, 3]) {
    await writeFile(join(folder, `slice${number}.dcm`), ctSlice({ number, z: number * 0.5 }));
  }
  return folder;
}

/** A request with a JSON body. */
export function jsonRequest(
  method: string,
  body: unknown,
  headers: Readonly<Record<string, string>> = {},
): RequestInit {
  return {
    method,
    body: JSON.stringify(body),
    headers: { 'Content-Type': 'application/json', ...headers },
  };
}
