import { connect } from 'node:net';

/** What a server answered to bytes that were sent as they are. */
export interface RawAnswer {
  readonly status: number;
  readonly head: string;
  readonly body: string;
}

/** Sends lines over a socket, with no client in between that would correct them, and reads until the server closes. */
export function rawRequest(port: number, lines: readonly string[], body = ''): Promise<RawAnswer> {
  return new Promise((resolve, reject) => {
    const socket = connect(port, '127.0.0.1');
    let text = '';
    socket.setEncoding('latin1');
    socket.on('data', (chunk) => {
      text += chunk;
    });
    socket.on('error', reject);
    socket.on('close', () => {
      const [head = '', ...rest] = text.split('\r\n\r\n');
      resolve({
        status: Number(/^HTTP\/1\.1 (\d+)/.exec(head)?.[1] ?? 0),
        head,
        body: rest.join('\r\n\r\n'),
      });
    });
    socket.write(`${lines.join('\r\n')}\r\nConnection: close\r\n\r\n${body}`);
  });
}
