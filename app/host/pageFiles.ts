import { existsSync, readdirSync } from 'node:fs';
import { extname, join, relative, sep } from 'node:path';

/** One file of the built page. */
export interface PageFile {
  readonly path: string;
  readonly type: string;
}

/** The files of the built page by their path in the address: '/', '/assets/index-1a2b.js' … */
export type PageFiles = ReadonlyMap<string, PageFile>;

const TYPES: Readonly<Record<string, string>> = {
  '.html': 'text/html; charset=utf-8',
  '.js': 'text/javascript; charset=utf-8',
  '.css': 'text/css; charset=utf-8',
  '.json': 'application/json',
  '.wasm': 'application/wasm',
  '.svg': 'image/svg+xml',
  '.png': 'image/png',
  '.ico': 'image/x-icon',
  '.woff2': 'font/woff2',
  '.txt': 'text/plain; charset=utf-8',
  '.map': 'application/json',
};

/**
 * Lists the built page once, at start. A request is answered only by looking its path up in this list,
 * so no form of '..', escape, backslash or link in a request can name another file. Links and files of
 * unknown type are not listed. Empty when the page has not been built.
 */
export function listPageFiles(directory: string): PageFiles {
  const files = new Map<string, PageFile>();
  if (!existsSync(directory)) return files;
  for (const entry of readdirSync(directory, { recursive: true, withFileTypes: true })) {
    const type = TYPES[extname(entry.name)];
    if (!entry.isFile() || type === undefined) continue;
    const path = join(entry.parentPath, entry.name);
    const name = `/${relative(directory, path).split(sep).map(encodeURIComponent).join('/')}`;
    files.set(name, { path, type });
    if (name === '/index.html') files.set('/', { path, type });
  }
  return files;
}
