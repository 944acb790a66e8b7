import { readFile } from 'node:fs/promises';
import type { z } from 'zod';
import { fileErrorCode } from './fileError.js';

/** What a JSON file of our own was found to hold. */
export type JsonFile<T> =
  | { readonly kind: 'absent' }
  | { readonly kind: 'broken' }
  | { readonly kind: 'value'; readonly value: T };

/** Reads and checks a JSON file. Unreadable, not JSON or of another shape: 'broken'; never an exception for those. */
export async function readJsonFile<S extends z.ZodType>(
  path: string,
  schema: S,
): Promise<JsonFile<z.output<S>>> {
  let text: string;
  try {
    text = await readFile(path, 'utf8');
  } catch (error) {
    const code = fileErrorCode(error);
    if (code === undefined) throw error;
    return code === 'ENOENT' ? { kind: 'absent' } : { kind: 'broken' };
  }
  const json = parseJson(text);
  const parsed = schema.safeParse(json);
  return parsed.success ? { kind: 'value', value: parsed.data } : { kind: 'broken' };
}

/** The value of a JSON text; undefined, which JSON can't hold, when it is none. */
export function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch (error) {
    if (error instanceof SyntaxError) return undefined;
    throw error;
  }
}
