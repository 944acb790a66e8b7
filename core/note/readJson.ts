import { type Result, refuse, success } from '../result.js';

/** Parses JSON text. A byte order mark before it does no harm (RFC 8259, section 8.1, lets a reader ignore it). */
export function readJson(text: string): Result<unknown> {
  try {
    const value: unknown = JSON.parse(text.replace(/^\ufeff/, ''));
    return success(value);
  } catch (error) {
    if (!(error instanceof SyntaxError)) throw error;
    return refuse('not-json', `This is not JSON: ${error.message}.`);
  }
}
