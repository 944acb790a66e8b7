import { Hono } from 'hono';
import { z } from 'zod';
import { jsonBody } from '../http/jsonBody.js';
import { limitBody, USUAL_BODY_BYTES } from '../http/limitBody.js';
import { refused } from '../http/refused.js';
import type { Services } from '../services.js';

const ChosenSchema = z.strictObject({ id: z.string().min(1).max(64) });

const NO_SUCH_PLACE = {
  code: 'no-such-place',
  text: 'This place is no longer known. Start the choice of a folder again.',
} as const;

/** The folder chooser of the browser shell. Ids stand for places that the host itself has listed; no path is taken. */
export function chooserRoutes(services: Services) {
  return new Hono()
    .get('/browse', async (context) => {
      const level = await services.chooser.level(context.req.query('at'));
      return level === undefined ? context.json(NO_SUCH_PLACE, 404) : context.json(level);
    })
    .post('/folders', limitBody(USUAL_BODY_BYTES), jsonBody(ChosenSchema), async (context) => {
      const path = services.chooser.find(context.req.valid('json').id);
      if (path === undefined) return context.json(NO_SUCH_PLACE, 404);
      const opened = await services.openFolder(path);
      return opened.ok ? context.json(opened.value) : refused(context, opened.refusal);
    });
}
