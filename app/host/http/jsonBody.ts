import { validator } from 'hono/validator';
import type { z } from 'zod';

/** Checks a request's JSON body against a schema; 400 with the first fault when it does not fit. */
export function jsonBody<S extends z.ZodType>(schema: S) {
  return validator('json', (value, context) => {
    const parsed = schema.safeParse(value);
    if (parsed.success) return parsed.data;
    const [fault] = parsed.error.issues;
    const where = fault === undefined || fault.path.length === 0 ? 'body' : fault.path.join('.');
    const text = `Not what this address takes: ${where}: ${fault?.message ?? 'not valid'}.`;
    return context.json({ code: 'bad-request', text }, 400);
  });
}
