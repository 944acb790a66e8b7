import { execFile, spawnSync } from 'node:child_process';
import { expect, onTestFinished, test } from 'vitest';
import { peerUser } from '../../../../app/loopback/peerUser.js';
import { startServer } from '../../../../app/loopback/server.js';

// Laid out as proc(5) describes /proc/net/tcp. 127.0.0.1 is 0100007F, port 4660 is 1234, 22136 is 5678.
const TABLE = `  sl  local_address rem_address   st tx_queue rx_queue tr tm->when retrnsmt   uid  timeout inode
   0: 0100007F:1234 00000000:0000 0A 00000000:00000000 00:00000000 00000000  1000        0 11 1 0 100 0
   1: 0100007F:1234 0100007F:5678 01 00000000:00000000 00:00000000 00000000  1000        0 12 1 0 20 4
   2: 0100007F:5678 0100007F:1234 01 00000000:00000000 00:00000000 00000000  1001        0 13 1 0 20 4
   3: 0200000A:5678 0100007F:1235 01 00000000:00000000 00:00000000 00000000  1002        0 14 1 0 20 4`;

test('the user of the other end is found, not that of our own end', () => {
  expect(peerUser(TABLE, 0x5678, 0x1234)).toBe(1001);
  expect(peerUser(TABLE, 0x1234, 0x5678)).toBe(1000);
});

test('an end that is not listed, or is of another address, is not told', () => {
  expect(peerUser(TABLE, 0x5679, 0x1234)).toBeUndefined();
  expect(peerUser(TABLE, 0x5678, 0x1235)).toBeUndefined();
  expect(peerUser('', 1, 2)).toBeUndefined();
});

const ASK = `
import socket, sys
s = socket.create_connection(("127.0.0.1", int(sys.argv[1])), 5)
s.sendall(b"GET / HTTP/1.1\\r\\nHost: 127.0.0.1:" + sys.argv[1].encode() + b"\\r\\nConnection: close\\r\\n\\r\\n")
data = b""
try:
    while chunk := s.recv(4096): data += chunk
except ConnectionResetError: pass
print(data[:12].decode())`;

/** The beginning of what the server answers to a Python program that a command before it may turn into another user. */
function answerTo(port: number, user: readonly string[]): Promise<string> {
  const [program = '', ...rest] = [...user, '/usr/bin/python3', '-c', ASK, String(port)];
  return new Promise((resolve, reject) => {
    execFile(program, rest, (error, out) => (error === null ? resolve(out.trim()) : reject(error)));
  });
}

// Only root can be another user for a moment; 65534 is nobody.
const nobody = ['setpriv', '--reuid=65534', '--regid=65534', '--clear-groups'];
const canChange =
  process.platform === 'linux' &&
  process.getuid?.() === 0 &&
  spawnSync('setpriv', [...nobody.slice(1), '/usr/bin/python3', '-c', '']).status === 0;

test.skipIf(!canChange)(
  'a connection of another user gets no answer, one of our own does',
  async () => {
    const server = await startServer(async () => new Response('page'));
    onTestFinished(() => server.close());
    expect(await answerTo(server.port, [])).toBe('HTTP/1.1 200');
    expect(await answerTo(server.port, nobody)).toBe('');
  },
);
