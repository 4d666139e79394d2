import { access } from 'node:fs/promises';
import { fileURLToPath } from 'node:url';
import type { TestProject } from 'vitest/node';
import { startServerProcess } from './server-process.ts';
import { createDemoDatabase, dropDatabases, testRun, urlOf } from './test-databases.ts';

declare module 'vitest' {
  // Vitest's own interface, which each provider adds to.
  interface ProvidedContext {
    readonly baseUrl: string;
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
  const server = await startServerProcess({
    DATABASE_URL: urlOf(run.adminUrl, database),
    CLIENT_DIR: PAGES,
    NODE_ENV: 'production',
    // Nothing listens there: letters wait in the queue, where a test reads them.
    MAIL_URL: 'smtp://127.0.0.1:9',
    MAIL_FROM: 'post@pourbook.invalid',
  });
  project.provide('baseUrl', server.origin);
  return async () => {
    server.signal('SIGTERM');
    await server.ended;
    await dropDatabases(run.adminUrl, [database]);
  };
}
