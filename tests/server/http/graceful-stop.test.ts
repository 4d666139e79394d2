import { createConnection } from 'node:net';
import { afterEach, describe, expect, test } from 'vitest';
import knex from 'knex';
import { useDatabase } from '#tests/support/database.ts';
import { startServerProcess } from '#tests/support/server-process.ts';
import type { ServerProcess } from '#tests/support/server-process.ts';

const database = useDatabase();
const running: ServerProcess[] = [];
afterEach(async () => {
  for (const server of running.splice(0)) {
    server.signal('SIGKILL');
    await server.ended;
  }
});

async function start(settings: Record<string, string> = {}): Promise<ServerProcess> {
  const server = await startServerProcess({ DATABASE_URL: database.url, ...settings });
  running.push(server);
  return server;
}

/** Waits until `held` is so, asking again and again. */
async function until(held: () => Promise<boolean>): Promise<void> {
  while (!(await held()));
}

describe('the server as a process', () => {
  test('answers, and on SIGTERM ends with 0', async () => {
    const server = await start();
    const response = await fetch(`${server.origin}/api/makers`);
    expect(response.status).toBe(200);
    server.signal('SIGTERM');
    expect(await server.ended).toBe(0);
    expect(server.output()).toContain('"msg":"stopped"');
    await expect(fetch(server.origin)).rejects.toThrow();
  });

  test('finishes the request under way, and takes no more', async () => {
    const server = await start();
    const admin = knex({ client: 'pg', connection: database.url, pool: { min: 0, max: 2 } });
    try {
      // A lock keeps the request waiting for as long as we like, up to the server's own patience of two seconds.
      const lock = await admin.transaction();
      await lock.raw('lock table makers in access exclusive mode');
      const answer = fetch(`${server.origin}/api/makers`);
      await until(async () => {
        const { rows } = await admin.raw<{ rows: unknown[] }>(`select from pg_locks where not granted and relation = 'makers'::regclass`);
        return rows.length > 0;
      });
      server.signal('SIGTERM');
      await until(async () => fetch(`${server.origin}/healthz`).then(() => false, () => true));
      await lock.rollback();
      expect((await answer).status).toBe(200);
      expect(await server.ended).toBe(0);
    } finally {
      await admin.destroy();
    }
  });

  test('does not wait for a connection nobody uses', async () => {
    const server = await start();
    const { port } = new URL(server.origin);
    const idle = createConnection({ host: '127.0.0.1', port: Number(port) });
    await new Promise((resolve) => idle.once('connect', resolve));
    idle.on('error', () => idle.destroy());
    server.signal('SIGTERM');
    expect(await server.ended).toBe(0);
    idle.destroy();
  });

  test('does not start with wrong settings, and lists them all', async () => {
    const refused = startServerProcess({ DATABASE_URL: 'nonsense', PORT: 'eighty' });
    await expect(refused).rejects.toThrow(/DATABASE_URL: [^\n]*\n[^\n]*PORT: |PORT: [^\n]*\n[^\n]*DATABASE_URL: /);
  });
});
