import { createServer } from 'node:http';
import type { RequestListener } from 'node:http';
import type { AddressInfo } from 'node:net';

/** Milliseconds a slow client is given: for the head, for the whole request, and between looks at the clock. */
const TIMEOUTS = { headersTimeout: 15_000, requestTimeout: 180_000, connectionsCheckingInterval: 5_000, keepAliveTimeout: 5_000 } as const;
const MOST_CONNECTIONS = 1_000;

/** Milliseconds requests under way are given to finish once the server was asked to stop. */
const GRACE = 10_000;
const IDLE_SWEEP = 100;

export type RunningServer = {
  readonly port: number;
  /** Stops accepting, lets requests under way finish for up to ten seconds, then cuts what is left. */
  readonly stop: () => Promise<void>;
};

/**
 * Listens; port 0 takes any free one.
 *
 * @throws the system's error when the address cannot be had.
 */
export async function startServer(app: RequestListener, { host, port }: { host: string; port: number }): Promise<RunningServer> {
  const server = createServer(TIMEOUTS, app);
  server.maxConnections = MOST_CONNECTIONS;
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, host, () => {
      server.off('error', reject);
      resolve();
    });
  });

  return {
    port: portOf(server.address()),
    stop: () =>
      new Promise((resolve, reject) => {
        // Connections whose last request ends after `close` would otherwise be kept for the next one.
        const sweep = setInterval(() => server.closeIdleConnections(), IDLE_SWEEP);
        const cut = setTimeout(() => server.closeAllConnections(), GRACE);
        server.close((error) => {
          clearInterval(sweep);
          clearTimeout(cut);
          if (error) reject(error);
          else resolve();
        });
      }),
  };
}

function portOf(address: AddressInfo | string | null): number {
  if (address === null || typeof address === 'string') throw new TypeError('The server does not listen on a port');
  return address.port;
}
