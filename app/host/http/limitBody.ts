import type { MiddlewareHandler } from 'hono';
import { bodyLimit } from 'hono/body-limit';

/** Most routes take so many bytes at most. */
export const USUAL_BODY_BYTES = 1 << 20;

/** A note with many outlines is larger. */
export const NOTE_BODY_BYTES = 4 << 20;

/** Refuses a body of more bytes, whether it says its length or not. */
export function limitBody(bytes: number): MiddlewareHandler {
  return bodyLimit({
    maxSize: bytes,
    onError: (context) =>
      context.json(
        { code: 'too-large', text: `More than ${bytes >> 20} MiB can’t be taken.` },
        413,
      ),
  });
}
