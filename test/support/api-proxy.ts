import net from 'node:net';

export interface TcpProxy {
  /** The target's URL with the proxy's port. */
  url: string;
  /** Breaks all connections and refuses new ones, as a server that is away does. */
  cut: () => Promise<void>;
  mend: () => Promise<void>;
}

/** Stands between a client and a server, so that a test can take the server away from this client alone. */
export async function startProxy(targetUrl: string): Promise<TcpProxy> {
  const target = new URL(targetUrl);
  const sockets = new Set<net.Socket>();
  const server = net.createServer((client) => {
    const upstream = net.connect(Number(target.port), target.hostname);
    for (const [from, to] of [
      [client, upstream],
      [upstream, client],
    ] as const) {
      sockets.add(from);
      from.pipe(to);
      from.on('error', () => to.destroy());
      from.on('close', () => {
        sockets.delete(from);
        to.destroy();
      });
    }
  });
  const listenOn = (port: number): Promise<void> => new Promise((resolve) => server.listen(port, '127.0.0.1', resolve));
  await listenOn(0);
  const address = server.address();
  const port = typeof address === 'object' && address !== null ? address.port : 0;
  const url = new URL(targetUrl);
  url.port = String(port);
  return {
    url: url.href,
    mend: () => listenOn(port),
    cut: () =>
      new Promise((resolve) => {
        server.close(() => resolve());
        for (const socket of sockets) socket.destroy();
      }),
  };
}
