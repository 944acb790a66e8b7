import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { getRequestListener } from '@hono/node-server';
import type { Handler } from '../host/handler.js';
import { SECURITY_HEADERS } from '../host/http/securityHeaders.js';
import { isOtherUser } from './peerUser.js';
import { mayEnter } from './requestGate.js';

/** The one address that is listened on: never a name, never all addresses. */
const HOST = '127.0.0.1';

/** A server that listens. */
export interface LoopbackServer {
  readonly port: number;
  /** 'http://127.0.0.1:PORT', as the browser states it. */
  readonly origin: string;
  /** What the socket is bound to, as the system says. */
  readonly address: AddressInfo;
  /** Stops listening and ends every connection. */
  close(): Promise<void>;
}

/**
 * Mounts the host's handler on 127.0.0.1. What does not pass the gate gets 403 and an empty body;
 * a connection of another user of this machine is cut off.
 *
 * @param port 0 for any that is free, which is the rule
 */
export async function startServer(handler: Handler, port = 0): Promise<LoopbackServer> {
  const listener = getRequestListener(handler, { overrideGlobalObjects: false });
  const server = createServer(
    {
      // Without a Host header Node would answer 400 itself; the gate answers for that case too.
      requireHostHeader: false,
      headersTimeout: 10_000,
      requestTimeout: 60_000,
      keepAliveTimeout: 10_000,
      connectionsCheckingInterval: 5_000,
    },
    (request, response) => {
      const { method, url: target, headersDistinct: headers } = request;
      if (mayEnter({ method, target, headers }, boundAddress(server).port)) {
        void listener(request, response);
        return;
      }
      response.writeHead(403, { ...SECURITY_HEADERS, Connection: 'close' });
      response.end();
    },
  );
  server.maxConnections = 64;
  server.on('connection', (socket) => {
    if (isOtherUser(socket.remotePort, socket.localPort)) socket.destroy();
  });
  await listen(server, port);
  const address = boundAddress(server);
  return {
    port: address.port,
    origin: `http://${HOST}:${address.port}`,
    address,
    close: () => close(server),
  };
}

function listen(server: Server, port: number): Promise<void> {
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen({ host: HOST, port, exclusive: true }, () => {
      server.off('error', reject);
      resolve();
    });
  });
}

function boundAddress(server: Server): AddressInfo {
  const address = server.address();
  if (address === null || typeof address === 'string') {
    throw new Error(`not listening on a port: ${address}`);
  }
  return address;
}

function close(server: Server): Promise<void> {
  return new Promise((resolve) => {
    server.close(() => resolve());
    server.closeAllConnections();
  });
}
