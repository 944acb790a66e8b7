import type { MiddlewareHandler } from 'hono';

const JSON_TYPE = /^application\/json\s*(;\s*charset=utf-8\s*)?$/i;

/** Bodies are JSON or not there at all: what a form or a beacon of a foreign page could send is refused. */
export const requireJson: MiddlewareHandler = async (context, next) => {
  const type = context.req.header('Content-Type');
  const length = context.req.header('Content-Length');
  const chunked = context.req.header('Transfer-Encoding') !== undefined;
  const bodiless = type === undefined && !chunked && (length === undefined || length === '0');
  if (!bodiless && !JSON_TYPE.test(type ?? '')) {
    return context.json(
      { code: 'not-json', text: 'The content type must be application/json.' },
      415,
    );
  }
  await next();
  return undefined;
};
