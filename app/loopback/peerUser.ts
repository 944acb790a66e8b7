import { readFileSync } from 'node:fs';
import { fileErrorCode } from '../host/storage/fileError.js';

/** 127.0.0.1 as the table writes it on little-endian machines, and on big-endian ones. */
const LOOPBACK = ['0100007F', '7F000001'];

/**
 * The user who holds the other end of a connection over 127.0.0.1, by the kernel's table of sockets
 * (proc(5), /proc/net/tcp: address and port in hexadecimal, the user's number in the eighth column).
 * Undefined when the table does not list it.
 */
export function peerUser(table: string, peerPort: number, ownPort: number): number | undefined {
  for (const line of table.split('\n').slice(1)) {
    const [, local, remote, , , , , user] = line.trim().split(/\s+/);
    if (isEnd(local, peerPort) && isEnd(remote, ownPort)) return Number(user);
  }
  return undefined;
}

/** 127.0.0.1 may stand at the end of a longer address, as in ::ffff:127.0.0.1 of /proc/net/tcp6. */
function isEnd(end: string | undefined, port: number): boolean {
  const [address = '', hex = ''] = end?.split(':') ?? [];
  return LOOPBACK.includes(address.slice(-8)) && Number.parseInt(hex, 16) === port;
}

/**
 * Whether a connection comes from another user of this machine, who could have read the address and its
 * token in the list of processes. Only Linux tells; where it can't be told the token alone has to do.
 * Root is no other user: it can read everything as it is.
 */
export function isOtherUser(peerPort: number | undefined, ownPort: number | undefined): boolean {
  if (process.platform !== 'linux' || peerPort === undefined || ownPort === undefined) return false;
  for (const path of ['/proc/net/tcp', '/proc/net/tcp6']) {
    const user = peerUser(readTable(path), peerPort, ownPort);
    if (user !== undefined) return user !== 0 && user !== process.getuid?.();
  }
  return false;
}

function readTable(path: string): string {
  try {
    return readFileSync(path, 'latin1');
  } catch (error) {
    if (fileErrorCode(error) === undefined) throw error;
    return '';
  }
}
