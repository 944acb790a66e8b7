/** Scheme of the page. It is served by the host's handler alone and never touches the network. */
export const SCHEME = 'app';

/** Origin of the page as Chromium serialises it for a standard scheme (RFC 6454). */
export const ORIGIN = 'app://local';

/** Address of the page. */
export const START_URL = `${ORIGIN}/`;

/**
 * True when an address belongs to the page's own origin.
 *
 * Node gives every address of a scheme that it does not know the origin 'null', so scheme, host and
 * port are compared one by one. An address that can't be read is not ours.
 */
export function isOwnUrl(address: string): boolean {
  if (!URL.canParse(address)) return false;
  const url = new URL(address);
  return (
    url.protocol === `${SCHEME}:` &&
    url.host === 'local' &&
    url.username === '' &&
    url.password === ''
  );
}
