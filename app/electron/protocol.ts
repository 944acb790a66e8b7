import type { CustomScheme } from 'electron';
import type { Log } from './log.js';
import { isOwnUrl, ORIGIN, SCHEME } from './origin.js';

/** The host's one request handler (app/host/handler.ts). */
export type RequestHandler = (request: Request) => Response | Promise<Response>;

/** The parts of Electron's protocol module that are used. */
export interface ProtocolPart {
  handle(scheme: string, handler: (request: Request) => Promise<Response>): void;
}

/**
 * Privileges of the page's scheme. Standard and secure give it a real origin, fetch and workers;
 * stream lets frames and progress flow. It bypasses no policy, and has neither CORS nor service
 * workers. Must be registered before the app is ready.
 */
export const OWN_SCHEME: CustomScheme = {
  scheme: SCHEME,
  privileges: { standard: true, secure: true, supportFetchAPI: true, stream: true },
};

/** Mounts the host's handler on the page's scheme. Requests of any other origin get 403. */
export function serve(protocol: ProtocolPart, handler: RequestHandler, log: Log): void {
  protocol.handle(SCHEME, async (request) => {
    if (!isOwnUrl(request.url)) {
      log('refused a request: foreign host');
      return new Response(null, { status: 403 });
    }
    // Electron states who asked; unlike a header, the page can't choose it. It is absent when the
    // browser itself asks, as for the page's own address.
    const initiator = (request as { readonly initiatorOrigin?: string | null }).initiatorOrigin;
    if (initiator !== undefined && initiator !== ORIGIN) {
      log('refused a request: foreign origin');
      return new Response(null, { status: 403 });
    }
    return handler(request);
  });
}
