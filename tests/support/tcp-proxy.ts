import { connect, createServer } from 'node:net';
import type { AddressInfo, Server, Socket } from 'node:net';

export type TcpProxy = {
  readonly port: number;
  /** Drops every connection and refuses new ones, as a server that went away does. */
  readonly cut: () => Promise<void>;
  /** Accepts again, on the same port. */
  readonly mend: () => Promise<void>;
};

/** A wire to a server that a test can cut. `cut` it for good when done. */
export async function startTcpProxy(target: { readonly host: string; readonly port: number }): Promise<TcpProxy> {
  const open = new Set<Socket>();
  const server = createServer((inbound) => {
    const outbound = connect(target);
    for (const socket of [inbound, outbound]) {
      open.add(socket);
      socket.on('error', () => socket.destroy());
      socket.on('close', () => {
        open.delete(socket);
        inbound.destroy();
        outbound.destroy();
      });
    }
    inbound.pipe(outbound).pipe(inbound);
  });
  const port = await listen(server, 0);
  return {
    port,
    cut: () =>
      new Promise((resolve) => {
        server.close(() => resolve());
        for (const socket of open) socket.destroy();
      }),
    mend: async () => {
      await listen(server, port);
    },
  };
}

async function listen(server: Server, port: number): Promise<number> {
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, '127.0.0.1', resolve);
  });
  return (server.address() as AddressInfo).port;
}
