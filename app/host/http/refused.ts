import type { Context } from 'hono';
import type { Refusal } from '../../../core/result.js';
import type { JobFailure } from '../contract.js';
import { refusalStatus } from './refusalStatus.js';

/** Answers a request with a refusal: its status, its code and its sentence. */
export function refused(context: Context, { code, text }: Refusal) {
  const body: JobFailure = { code, text };
  return context.json(body, refusalStatus(code));
}
