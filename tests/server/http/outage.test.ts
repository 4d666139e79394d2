import type { Knex } from 'knex';
import supertest from 'supertest';
import { afterEach, describe, expect, test } from 'vitest';
import { connect } from '#db/connection.ts';
import { appOver } from '#tests/support/app.ts';
import { useDatabase } from '#tests/support/database.ts';
import { keptLog } from '#tests/support/log.ts';
import { problemOf } from '#tests/support/problem.ts';
import { startTcpProxy } from '#tests/support/tcp-proxy.ts';

const database = useDatabase();

const cleanUps: (() => Promise<void>)[] = [];
afterEach(async () => {
  for (const cleanUp of cleanUps.splice(0).toReversed()) await cleanUp();
});

/** An app with connections of its own, as the server has. */
function appAt(url: string, poolSize = 4): { readonly agent: supertest.Agent; readonly knex: Knex } {
  const knex = connect(url, { poolSize });
  cleanUps.push(() => knex.destroy());
  return { agent: supertest.agent(appOver(knex, keptLog())), knex };
}

async function unavailable(call: supertest.Test): Promise<void> {
  const problem = await problemOf(call, 503);
  expect(problem.detail).not.toMatch(/ECONN|127\.0\.0\.1|terminat/i);
}

describe('while the database is away', () => {
  test('it answers 503 and when to try again, and goes on by itself afterwards', async () => {
    const { hostname, port } = new URL(database.url);
    const proxy = await startTcpProxy({ host: hostname, port: Number(port || '5432') });
    cleanUps.push(proxy.cut);
    const url = new URL(database.url);
    url.hostname = '127.0.0.1';
    url.port = String(proxy.port);
    const { agent } = appAt(url.href);
    await agent.get('/api/makers').expect(200);

    await proxy.cut();
    await unavailable(agent.get('/api/makers'));
    await unavailable(agent.get('/readyz'));
    expect((await agent.get('/api/makers')).headers['retry-after']).toBe('2');
    await agent.get('/healthz').expect(200);

    await proxy.mend();
    await agent.get('/api/makers').expect(200);
    await agent.get('/readyz').expect(200);
  });

  test('a connection the administrator ends is replaced', async () => {
    const { agent, knex } = appAt(database.url, 1);
    await agent.get('/api/makers').expect(200);
    const killed = knex.raw('select pg_terminate_backend(pg_backend_pid())').then(
      () => undefined,
      (error: unknown) => error,
    );
    expect(await killed).toMatchObject({ code: '57P01' });
    // The pool learns of it a moment after the query does; until then a request is told to try again, never that something broke.
    const statuses: number[] = [];
    await expect
      .poll(async () => {
        const { status } = await agent.get('/api/makers');
        statuses.push(status);
        return status;
      }, { timeout: 2_000 })
      .toBe(200);
    expect(statuses.filter((status) => status !== 200 && status !== 503)).toEqual([]);
  });

  test('with every connection held it refuses instead of waiting for ever, and goes on when one is free', async () => {
    const { agent, knex } = appAt(database.url, 1);
    const holder = await knex.transaction();
    await unavailable(agent.get('/api/makers'));
    await agent.get('/healthz').expect(200);
    await holder.rollback();
    await agent.get('/api/makers').expect(200);
  });
});
