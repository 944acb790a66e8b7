import { randomBytes } from 'node:crypto';

/** The secret of one launch: 32 random bytes, base64url. */
export function launchToken(): string {
  return randomBytes(32).toString('base64url');
}

/** Address of the page with the token in its fragment, which no browser sends and no server logs. */
export function launchAddress(origin: string, token: string): string {
  return `${origin}/#${token}`;
}
