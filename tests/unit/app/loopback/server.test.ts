import { createConnection } from 'node:net';
import { networkInterfaces } from 'node:os';
import { expect, onTestFinished, test } from 'vitest';
import { type LoopbackServer, startServer } from '../../../../app/loopback/server.js';
import { launchAddress, launchToken } from '../../../../app/loopback/token.js';
import { success } from '../../../../core/result.js';
import { type HostForTest, hostForTest } from '../host/hostForTest.js';
import { sampleNote } from '../host/sampleNote.js';
import { rawRequest } from './rawRequest.js';

const TOKEN = launchToken();
const BEARER = `Authorization: Bearer ${TOKEN}`;

async function running(options: Parameters<typeof hostForTest>[0] = {}): Promise<{
  readonly host: HostForTest;
  readonly server: LoopbackServer;
  readonly hostLine: string;
}> {
  const host = await hostForTest({ folderChooser: true, ...options, token: TOKEN });
  const server = await startServer(host.handler);
  onTestFinished(() => server.close());
  return { host, server, hostLine: `Host: 127.0.0.1:${server.port}` };
}

test('a token is 32 bytes, new at each launch, and only in the fragment of the address', () => {
  expect(Buffer.from(TOKEN, 'base64url')).toHaveLength(32);
  expect(launchToken()).not.toBe(TOKEN);
  const address = new URL(launchAddress('http://127.0.0.1:1', TOKEN));
  expect([address.pathname, address.search, address.hash]).toEqual(['/', '', `#${TOKEN}`]);
});

test('the socket is bound to 127.0.0.1 and to no other address of the machine', async () => {
  const { server } = await running();
  expect(server.address).toMatchObject({ address: '127.0.0.1', family: 'IPv4' });
  expect(server.port).toBeGreaterThan(0);
  const others = Object.values(networkInterfaces())
    .flatMap((addresses) => addresses ?? [])
    .filter(({ internal, family }) => !internal && family === 'IPv4')
    .map(({ address }) => address);
  for (const address of ['127.0.0.2', ...others]) {
    const answer = await new Promise<string>((resolve) => {
      const socket = createConnection({ host: address, port: server.port });
      socket.on('connect', () => {
        socket.destroy();
        resolve('connected');
      });
      socket.on('error', (error) => resolve('code' in error ? String(error.code) : error.message));
    });
    expect([address, answer]).toEqual([address, 'ECONNREFUSED']);
  }
});

test('the page comes without a token, data with it', async () => {
  const { hostLine, server } = await running();
  const page = await rawRequest(server.port, ['GET / HTTP/1.1', hostLine, 'Sec-Fetch-Site: none']);
  expect(page.status).toBe(200);
  expect(page.body).toContain('<title>Page</title>');
  expect(page.head).not.toContain(TOKEN);
  expect((await rawRequest(server.port, ['GET /api/session HTTP/1.1', hostLine])).status).toBe(401);
  const inQuery = [`GET /api/session?token=${TOKEN} HTTP/1.1`, hostLine];
  expect((await rawRequest(server.port, inQuery)).status).toBe(401);
  expect(
    (await rawRequest(server.port, ['GET /api/session HTTP/1.1', hostLine, BEARER])).status,
  ).toBe(200);
});

test('any other Host, or none, or two, gets 403 with an empty body', async () => {
  const { hostLine, server } = await running();
  const { port } = server;
  const hosts = [
    [],
    ['Host:'],
    ['Host: 127.0.0.1'],
    [`Host: 127.0.0.1:${port + 1}`],
    [`Host: localhost:${port}`],
    [`Host: [::1]:${port}`],
    [`Host: 127.attacker.example:${port}`],
    [`Host: 127.0.0.1.attacker.example:${port}`],
    [`Host: 127.0.0.1:${port}.attacker.example`],
    [`Host: attacker.example`],
    [hostLine, `Host: attacker.example:${port}`],
    [hostLine, hostLine],
  ];
  for (const lines of hosts) {
    const answer = await rawRequest(port, ['GET / HTTP/1.1', ...lines, BEARER]);
    expect([lines, answer.status, answer.body.replace(/^0\r\n\r\n$/, '')]).toEqual([
      lines,
      403,
      '',
    ]);
  }
  expect((await rawRequest(port, ['GET / HTTP/1.0', BEARER])).status).toBe(403);
  expect((await rawRequest(port, [`GET http://attacker.example/ HTTP/1.1`, hostLine])).status).toBe(
    403,
  );
});

test('a foreign or null Origin gets 403, and a change needs our own', async () => {
  const { hostLine, server } = await running();
  const own = `Origin: ${server.origin}`;
  const forget = (...lines: readonly string[]) =>
    rawRequest(server.port, ['DELETE /api/recent HTTP/1.1', hostLine, BEARER, ...lines]);
  const session = (...lines: readonly string[]) =>
    rawRequest(server.port, ['GET /api/session HTTP/1.1', hostLine, BEARER, ...lines]);
  const foreign = ['https://attacker.example', 'null', '', `http://127.0.0.1:${server.port + 1}`];
  for (const origin of [
    ...foreign,
    `https://127.0.0.1:${server.port}`,
    `http://localhost:${server.port}`,
  ]) {
    expect([origin, (await forget(`Origin: ${origin}`)).status]).toEqual([origin, 403]);
    expect([origin, (await session(`Origin: ${origin}`)).status]).toEqual([origin, 403]);
  }
  expect((await forget()).status).toBe(403);
  expect((await forget(own, 'Origin: https://attacker.example')).status).toBe(403);
  expect((await forget(own)).status).toBe(200);
  expect((await session(own)).status).toBe(200);
});

test('what the browser says came from another site gets 403', async () => {
  const { hostLine, server } = await running();
  const page = (site: string) =>
    rawRequest(server.port, ['GET / HTTP/1.1', hostLine, `Sec-Fetch-Site: ${site}`]);
  expect((await page('cross-site')).status).toBe(403);
  expect((await page('same-site')).status).toBe(403);
  expect((await page('same-origin')).status).toBe(200);
  expect((await page('none')).status).toBe(200);
});

test('a WebSocket upgrade gets 403, from a foreign origin and from our own', async () => {
  const { hostLine, server } = await running();
  for (const origin of ['https://attacker.example', server.origin]) {
    const answer = await rawRequest(server.port, [
      'GET /api/presence HTTP/1.1',
      hostLine,
      BEARER,
      `Origin: ${origin}`,
      'Upgrade: websocket',
      'Sec-WebSocket-Version: 13',
      'Sec-WebSocket-Key: AAAAAAAAAAAAAAAAAAAAAA==',
    ]);
    expect(answer.status).toBe(403);
  }
});

test('OPTIONS gets 405 and no answer has a CORS header', async () => {
  const { hostLine, server } = await running();
  const answer = await rawRequest(server.port, [
    'OPTIONS /api/session HTTP/1.1',
    hostLine,
    `Origin: ${server.origin}`,
    'Access-Control-Request-Method: PUT',
  ]);
  expect(answer.status).toBe(405);
  expect(answer.head.toLowerCase()).not.toContain('access-control');
});

test('POST as text, as a form could send it, gets 415', async () => {
  const { hostLine, server } = await running();
  const body = '{"id": "x"}';
  const answer = await rawRequest(
    server.port,
    [
      'POST /api/folders HTTP/1.1',
      hostLine,
      BEARER,
      `Origin: ${server.origin}`,
      'Content-Type: text/plain',
      `Content-Length: ${body.length}`,
    ],
    body,
  );
  expect(answer.status).toBe(415);
});

test('no form of a path leads to a file that is not of the page', async () => {
  const { hostLine, server } = await running();
  const paths = [
    '/../package.json',
    '/../../../../etc/passwd',
    '/%2e%2e/%2e%2e/etc/passwd',
    '/..%2f..%2fetc/passwd',
    '/%252e%252e/etc/passwd',
    '/..\\..\\etc\\passwd',
    '/..%5c..%5cetc%5cpasswd',
    '/index.html%00',
    '/assets/',
    '//etc/passwd',
    '/file:///etc/passwd',
  ];
  for (const path of paths) {
    const answer = await rawRequest(server.port, [`GET ${path} HTTP/1.1`, hostLine, BEARER]);
    // A raw backslash is no URL at all: the adapter answers 400 before the handler hears of it.
    expect([path, answer.status]).toEqual([path, path.includes('\\') ? 400 : 404]);
    expect(answer.body).not.toContain('root:');
  }
});

test('a second window that saves from the same tag gets 412', async () => {
  const { server } = await running();
  const put = (comment: string, condition: Record<string, string>) =>
    fetch(`${server.origin}/api/notes/2.25.77001.1`, {
      method: 'PUT',
      body: JSON.stringify(sampleNote({ comment })),
      headers: {
        Authorization: `Bearer ${TOKEN}`,
        Origin: server.origin,
        'Content-Type': 'application/json',
        ...condition,
      },
    });
  const first = await put('first', { 'If-None-Match': '*' });
  const etag = first.headers.get('ETag') ?? '';
  const windows = await Promise.all([
    put('left', { 'If-Match': etag }),
    put('right', { 'If-Match': etag }),
  ]);
  expect(first.status).toBe(201);
  expect(windows.map(({ status }) => status).sort()).toEqual([200, 412]);
});

test('a body without end is cut off at 1 MiB', async () => {
  const { server } = await running();
  const body = new ReadableStream<Uint8Array>({
    pull: (controller) => controller.enqueue(new Uint8Array(1 << 18).fill(0x20)),
  });
  const answer = await fetch(`${server.origin}/api/settings`, {
    method: 'PUT',
    body,
    duplex: 'half',
    headers: {
      Authorization: `Bearer ${TOKEN}`,
      Origin: server.origin,
      'Content-Type': 'application/json',
    },
  } as RequestInit);
  expect(answer.status).toBe(413);
});

test('a page that closes its connection is no longer present, and its job is told to stop', async () => {
  let stopped = false;
  const { host, hostLine, server } = await running({
    ensureDemonstration: async (_data, { signal }) => {
      await new Promise<void>((resolve) => signal?.addEventListener('abort', () => resolve()));
      stopped = true;
      return success({ folder: '/' });
    },
  });
  const presence = createConnection({ host: '127.0.0.1', port: server.port });
  presence.write(`GET /api/presence HTTP/1.1\r\n${hostLine}\r\n${BEARER}\r\n\r\n`);
  const job = createConnection({ host: '127.0.0.1', port: server.port });
  job.write(
    `POST /api/demonstration HTTP/1.1\r\n${hostLine}\r\n${BEARER}\r\nOrigin: ${server.origin}\r\nContent-Length: 0\r\n\r\n`,
  );
  await Promise.all(
    [presence, job].map((socket) => new Promise((resolve) => socket.once('data', resolve))),
  );
  expect(host.services.presence.count).toBe(1);
  presence.destroy();
  job.destroy();
  await expect.poll(() => host.services.presence.count).toBe(0);
  await expect.poll(() => stopped).toBe(true);
  expect(host.reported).toEqual([]);
});

test('closing ends connections that are still open', async () => {
  const { hostLine, server } = await running();
  const socket = createConnection({ host: '127.0.0.1', port: server.port });
  const closed = new Promise<void>((resolve) => socket.once('close', () => resolve()));
  socket.write(`GET /api/presence HTTP/1.1\r\n${hostLine}\r\n${BEARER}\r\n\r\n`);
  await new Promise((resolve) => socket.once('data', resolve));
  await server.close();
  await closed;
});
