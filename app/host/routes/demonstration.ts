import { Hono } from 'hono';
import { jobStream } from '../http/jobStream.js';
import type { Services } from '../services.js';

/** Makes the synthetic demonstration study where it is not there yet, and opens it. */
export function demonstrationRoutes(services: Services) {
  return new Hono().post('/demonstration', (context) =>
    jobStream(context.req.raw.signal, services.report, services.openDemonstration),
  );
}
