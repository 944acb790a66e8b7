import { Hono } from 'hono';
import type { Session } from '../contract.js';
import { jsonBody } from '../http/jsonBody.js';
import { limitBody, USUAL_BODY_BYTES } from '../http/limitBody.js';
import type { Services } from '../services.js';
import { SettingsSchema } from '../settings.js';

/** What the page learns at start, and the settings that it may change. */
export function sessionRoutes(services: Services, openDemonstration: boolean) {
  return new Hono()
    .get('/session', async (context) => {
      const { settings, remarks } = await services.settings.read();
      const folders = services.grants.list();
      const session: Session = {
        version: services.version,
        folders,
        recent: await services.recents.list(),
        settings,
        openDemonstration: openDemonstration && folders.length === 0,
        remarks,
      };
      return context.json(session);
    })
    .put('/settings', limitBody(USUAL_BODY_BYTES), jsonBody(SettingsSchema), async (context) => {
      const settings = context.req.valid('json');
      await services.settings.write(settings);
      return context.json(settings);
    });
}
