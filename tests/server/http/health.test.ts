import { describe, expect, test } from 'vitest';
import { useApp } from '#tests/support/app.ts';
import { useDatabase } from '#tests/support/database.ts';
import { problemOf } from '#tests/support/problem.ts';

const database = useDatabase();
const app = useApp(database);

describe('health', () => {
  test('the process is alive', async () => {
    const response = await app.agent.get('/healthz').expect(200, { status: 'alive' });
    expect(response.headers['cache-control']).toBe('no-store');
  });

  test('it is ready while the database is reachable and up to date', async () => {
    await app.agent.get('/readyz').expect(200, { status: 'ready', database: 'reachable', migrations: 'current', queue: 'alive', photos: 'writable' });
  });

  test('it is not ready while a migration has yet to run, and says in the log which', async () => {
    const [last] = await database.knex<{ id: number; name: string }>('migrations').orderBy('id', 'desc').limit(1);
    await database.knex('migrations').where({ id: last?.id ?? 0 }).delete();
    await problemOf(app.agent.get('/readyz'), 503);
    expect((await app.agent.get('/readyz')).headers['retry-after']).toBe('2');
    await app.agent.get('/healthz').expect(200);
    expect(app.log.text()).toContain(String(last?.name));
    expect(app.log.takeErrors()).not.toEqual([]);
  });

  test('it is not ready over a database that was never migrated', async () => {
    await database.knex.schema.renameTable('migrations', 'migrations_elsewhere');
    await problemOf(app.agent.get('/readyz'), 503);
    expect(app.log.takeErrors()).not.toEqual([]);
  });
});
