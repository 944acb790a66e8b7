import { createHash, timingSafeEqual } from 'node:crypto';
import type { MiddlewareHandler } from 'hono';

const digest = (text: string): Buffer => createHash('sha256').update(text).digest();

/** Lets a request pass only with `Authorization: Bearer` and the token. Compared by digests, in constant time. */
export function requireToken(token: string): MiddlewareHandler {
  const expected = digest(`Bearer ${token}`);
  return async (context, next) => {
    const given = context.req.header('Authorization') ?? '';
    if (!timingSafeEqual(digest(given), expected)) {
      context.header('WWW-Authenticate', 'Bearer');
      return context.json(
        {
          code: 'no-token',
          text: 'This page does not belong to the running Diptych. Start it anew.',
        },
        401,
      );
    }
    await next();
    return undefined;
  };
}
