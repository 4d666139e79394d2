import { once } from 'node:events';
import { access } from 'node:fs/promises';
import { createServer } from 'node:net';
import { fileURLToPath } from 'node:url';
import type { TestProject } from 'vitest/node';
import { startServerProcess } from './server-process.ts';
import { createDemoDatabase, dropDatabases, testRun, urlOf } from './test-databases.ts';

declare module 'vitest' {
  // Vitest's own interface, which each provider adds to.
  interface ProvidedContext {
    readonly baseUrl: string;
    /** The database behind it, for what a test prepares or looks up there. */
    readonly siteDatabase: string;
  }
}

const PAGES = fileURLToPath(new URL('../../dist/client', import.meta.url));

/** Once a run: the real server with the built pages, over a database of its own with the demo in it. */
export async function setup(project: TestProject): Promise<() => Promise<void>> {
  await access(`${PAGES}/index.html`).catch(() => {
    throw new Error('The pages are not built: run `npx vite build` first, or `npm test`');
  });
  const run = testRun();
  const database = await createDemoDatabase(run);
  const port = await freePort();
  // By name: a passkey belongs to a name and not to a number, and of names this one is never asked https of.
  const origin = `http://localhost:${port}`;
  const server = await startServerProcess({
    DATABASE_URL: urlOf(run.adminUrl, database),
    PORT: String(port),
    PUBLIC_ORIGIN: origin,
    CLIENT_DIR: PAGES,
    NODE_ENV: 'production',
    // Nothing listens there: letters wait in the queue, where a test reads them.
    MAIL_URL: 'smtp://127.0.0.1:9',
    MAIL_FROM: 'post@pourbook.invalid',
  });
  project.provide('baseUrl', origin);
  project.provide('siteDatabase', urlOf(run.adminUrl, database));
  return async () => {
    server.signal('SIGTERM');
    await server.ended;
    await dropDatabases(run.adminUrl, [database]);
  };
}

async function freePort(): Promise<number> {
  const server = createServer().listen(0, '127.0.0.1');
  await once(server, 'listening');
  const address = server.address();
  server.close();
  if (address === null || typeof address === 'string') throw new TypeError('A server on loopback listens on a port');
  return address.port;
}
