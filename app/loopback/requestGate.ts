/** The parts of a request by which the gate decides, each header with all its values. */
export interface GatedRequest {
  readonly method: string | undefined;
  /** The request's target as it was sent. */
  readonly target: string | undefined;
  readonly headers: Readonly<Record<string, readonly string[] | undefined>>;
}

/**
 * Whether a request may come in. It must name this server exactly as its host, which stops a foreign
 * name that was rebound to 127.0.0.1; and whatever it says of where it comes from must be this server,
 * which stops the pages of others. Anything but GET and HEAD must say so. No upgrade, no proxy request.
 */
export function mayEnter({ method, target, headers }: GatedRequest, port: number): boolean {
  const host = `127.0.0.1:${port}`;
  const origins = headers.origin ?? [];
  const sites = headers['sec-fetch-site'] ?? [];
  const reads = method === 'GET' || method === 'HEAD';
  return (
    target?.startsWith('/') === true &&
    isOnly(headers.host, host) &&
    (origins.length === 0 ? reads : isOnly(origins, `http://${host}`)) &&
    (sites.length === 0 || isOnly(sites, 'same-origin') || isOnly(sites, 'none')) &&
    headers.upgrade === undefined
  );
}

function isOnly(values: readonly string[] | undefined, expected: string): boolean {
  return values?.length === 1 && values[0] === expected;
}
