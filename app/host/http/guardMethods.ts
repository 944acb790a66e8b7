import type { MiddlewareHandler } from 'hono';

/** A route of the table: its method and its path with ':name' for a part that varies. */
export interface TableRoute {
  readonly method: string;
  readonly path: string;
}

/**
 * Lets only those requests pass whose path and method are in the table: 404 for an unknown path, 405
 * with `Allow` for another method, HEAD and OPTIONS included.
 */
export function guardMethods(table: () => readonly TableRoute[]): MiddlewareHandler {
  return async (context, next) => {
    const methods = table()
      .filter((route) => route.method !== 'ALL' && matches(route.path, context.req.path))
      .map((route) => route.method);
    if (methods.length === 0) {
      return context.json(
        { code: 'no-such-address', text: 'There is nothing at this address.' },
        404,
      );
    }
    if (!methods.includes(context.req.method)) {
      context.header('Allow', [...new Set(methods)].join(', '));
      return context.json({ code: 'wrong-method', text: 'This address does not take that.' }, 405);
    }
    await next();
    return undefined;
  };
}

function matches(pattern: string, path: string): boolean {
  const expected = pattern.split('/');
  const given = path.split('/');
  return (
    expected.length === given.length &&
    expected.every((part, index) =>
      part.startsWith(':') ? given[index] !== '' : part === given[index],
    )
  );
}
