import { readFile } from 'node:fs/promises';
import type { Context } from 'hono';
import type { PageFiles } from '../pageFiles.js';

/** Answers with a file of the built page. The path is only looked up among the names listed at start. */
export async function sendPage(context: Context, pages: PageFiles): Promise<Response> {
  if (context.req.method !== 'GET' && context.req.method !== 'HEAD') {
    context.header('Allow', 'GET, HEAD');
    return context.json({ code: 'wrong-method', text: 'This address does not take that.' }, 405);
  }
  const page = pages.get(new URL(context.req.url).pathname);
  if (page === undefined) {
    const text =
      pages.size === 0
        ? 'The page has not been built. Run npm run build, then start Diptych again.'
        : 'There is nothing at this address.';
    return context.json({ code: 'no-such-page', text }, 404);
  }
  return context.body(new Uint8Array(await readFile(page.path)), 200, {
    'Content-Type': page.type,
  });
}
