import { Hono } from 'hono';
import { HTTPException } from 'hono/http-exception';
import { guardMethods } from './http/guardMethods.js';
import { INTERNAL } from './http/jobStream.js';
import { requireJson } from './http/requireJson.js';
import { requireToken } from './http/requireToken.js';
import { securityHeaders } from './http/securityHeaders.js';
import { apiRoutes, type RouteOptions } from './routes/apiRoutes.js';
import { sendPage } from './routes/pages.js';
import type { Services } from './services.js';
import { fileErrorReason } from './storage/fileError.js';

export type { HostApp } from './routes/apiRoutes.js';

/** What a shell decides about the handler. */
export interface HandlerOptions extends RouteOptions {
  /** When given, every address under /api asks for it. Electron's own scheme needs none: only its page can reach it. */
  readonly token?: string;
}

/** Answers any request of the page: its files, JSON, frames and the progress of jobs. Never rejects. */
export type Handler = (request: Request) => Promise<Response>;

/**
 * The host as one function. Both shells mount it; what differs between them is in the options. Requests
 * are let through by a fixed table of paths and methods, then by the token, then by the content type.
 */
export function createHandler(services: Services, options: HandlerOptions = {}): Handler {
  const routes = apiRoutes(services, options);
  const app = new Hono();
  app.use(securityHeaders);
  app.use(
    '/api/*',
    guardMethods(() => routes.routes),
  );
  if (options.token !== undefined) app.use('/api/*', requireToken(options.token));
  app.use('/api/*', requireJson);
  app.route('/', routes);
  app.all('*', (context) => sendPage(context, services.pages));
  app.onError((error, context) => {
    if (error instanceof HTTPException) {
      return context.json(
        { code: 'bad-request', text: 'The request could not be understood.' },
        error.status,
      );
    }
    services.report(error);
    const reason = fileErrorReason(error);
    if (reason !== undefined) {
      return context.json(
        { code: 'disk', text: `The disk did not do what it should: ${reason}.` },
        500,
      );
    }
    return context.json(INTERNAL, 500);
  });
  return async (request) => app.fetch(request);
}
