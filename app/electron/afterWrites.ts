import type { RequestHandler } from './protocol.js';

const READING: readonly string[] = ['GET', 'HEAD'];

/**
 * The same handler, which calls back after each request that may have changed something: menu and
 * theme follow settings and recent folders that the page has changed.
 */
export function afterWrites(handler: RequestHandler, changed: () => void): RequestHandler {
  return async (request) => {
    const response = await handler(request);
    if (!READING.includes(request.method)) changed();
    return response;
  };
}
