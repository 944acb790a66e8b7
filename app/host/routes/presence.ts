import { Hono } from 'hono';
import { eventStream } from '../http/eventStream.js';
import type { Services } from '../services.js';

/** A stream that stays open as long as the page does; the shell ends itself some time after the last one. */
export function presenceRoutes(services: Services) {
  return new Hono().get('/presence', (context) =>
    eventStream({
      signal: context.req.raw.signal,
      onError: services.report,
      async run(_send, gone) {
        const leave = services.presence.enter();
        try {
          await new Promise<void>((resolve) => {
            if (gone.aborted) resolve();
            else gone.addEventListener('abort', () => resolve(), { once: true });
          });
        } finally {
          leave();
        }
      },
    }),
  );
}
