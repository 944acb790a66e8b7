import { Hono } from 'hono';
import { refused } from '../http/refused.js';
import type { Services } from '../services.js';

/** The folders opened last: open one again, take one off the list, forget them all. */
export function recentRoutes(services: Services) {
  return new Hono()
    .post('/recent/:id/open', async (context) => {
      const path = await services.recents.find(context.req.param('id'));
      if (path === undefined) {
        const text = 'This folder is no longer in the list of recent folders.';
        return context.json({ code: 'no-such-recent', text }, 404);
      }
      const opened = await services.openFolder(path);
      return opened.ok ? context.json(opened.value) : refused(context, opened.refusal);
    })
    .delete('/recent/:id', async (context) => {
      await services.recents.remove(context.req.param('id'));
      return context.json(await services.recents.list());
    })
    .delete('/recent', async (context) => {
      await services.recents.clear();
      return context.json(await services.recents.list());
    });
}
