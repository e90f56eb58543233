import { createServer, type RequestListener, type Server } from 'node:http';
import { setTimeout as pause } from 'node:timers/promises';

/** Time for requests under way to end when the server stops, ms. */
const GRACE_MS = 5_000;

/** An HTTP server that gives up on slow senders instead of keeping their connections. */
export function createHttpServer(listener: RequestListener): Server {
  const server = createServer(
    { headersTimeout: 10_000, requestTimeout: 60_000, connectionsCheckingInterval: 1_000 },
    listener,
  );
  server.maxConnections = 1_000;
  return server;
}

/** Begins to listen; fulfilled with the port, rejected when it is taken. */
export async function listen(server: Server, { host, port }: { host: string; port: number }): Promise<number> {
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, host, () => {
      server.off('error', reject);
      const address = server.address();
      resolve(typeof address === 'object' && address !== null ? address.port : port);
    });
  });
}

/** Takes no further requests, lets those under way end, then closes what is left. */
export async function close(server: Server): Promise<void> {
  const closed = new Promise<void>((resolve) => server.close(() => resolve()));
  server.closeIdleConnections();
  const late = new AbortController();
  await Promise.race([closed, pause(GRACE_MS, undefined, { signal: late.signal })]);
  late.abort();
  server.closeAllConnections();
  await closed;
}
