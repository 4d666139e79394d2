import { describe, expect, inject, test } from 'vitest';
import { connect, CONNECTION_LIMITS } from '#db/connection.ts';
import { useDatabase } from '#tests/support/database.ts';

const database = useDatabase();

async function selected(expression: string, bindings: readonly string[] = []): Promise<unknown> {
  const { knex } = database;
  const { rows } = await knex.raw<{ rows: readonly { value: unknown }[] }>('select ? as value', [knex.raw(expression, bindings)]);
  return rows[0]?.value;
}

describe('what values become', () => {
  // The process runs west of Greenwich (vite.config.ts), where the driver's own dates would be a day early in UTC.
  test.each<[string, unknown]>([
    [`date '1926-05-01'`, '1926-05-01'],
    [`array[date '1926-05-01', null]`, ['1926-05-01', null]],
    [`'{}'::date[]`, []],
    [`timestamptz '2026-03-04 10:00:00.5+02'`, '2026-03-04T08:00:00.500Z'],
    [`timestamptz '2026-07-04 10:00+00'`, '2026-07-04T10:00:00.000Z'],
    [`9223372036854775807::int8`, '9223372036854775807'],
    [`(select count(*) from generate_series(1, 3))`, '3'],
    [`1.5::numeric(6, 3)`, 1.5],
    [`7::int4`, 7],
    [`int8range(1001, 1390, '[]')`, { from: '1001', to: '1390' }],
    [`int4range(0, 365, '[]')`, { from: 0, to: 365 }],
    [`daterange('1938-07-01', '1944-03-31', '[]')`, { from: '1938-07-01', to: '1944-03-31' }],
    [`int8range(1, 1)`, null],
    [`null::daterange`, null],
    [`'{"a": [1]}'::jsonb`, { a: [1] }],
    [`array['a', 'b']`, ['a', 'b']],
  ])('%s', async (expression, value) => expect(await selected(expression)).toEqual(value));

  test('a range in a column of its own type', async () => {
    const row = await database
      .knex<{ numbers: unknown; slug: string }>('serial_ranges')
      .whereLike('slug', '%-1001-1390-%-14')
      .first();
    expect(row?.numbers).toEqual({ from: '1001', to: '1390' });
  });
});

describe('limits', () => {
  test.each([
    ['statement_timeout', '5s'],
    ['lock_timeout', '2s'],
    ['idle_in_transaction_session_timeout', '10s'],
    ['TimeZone', 'UTC'],
  ])('%s is %s', async (setting, value) => {
    expect(await selected('current_setting(?)', [setting])).toBe(value);
  });

  test('a statement over its time is cut off, and the connection goes on', async () => {
    const short = connect(database.url, { statementTimeout: 50 });
    try {
      await expect(short.raw('select pg_sleep(5)')).rejects.toMatchObject({ code: '57014' });
      await expect(short.raw('select 1')).resolves.toBeDefined();
    } finally {
      await short.destroy();
    }
  });

  test('the pool holds no more than it was told', () => {
    const small = connect(database.url, { poolSize: 3 });
    expect(small.client).toMatchObject({ pool: { max: 3 }, config: { acquireConnectionTimeout: CONNECTION_LIMITS.acquire } });
  });

  test('connecting opens nothing until it is asked something', () => {
    const nowhere = connect('postgres://nobody@127.0.0.1:1/nothing');
    expect(nowhere.client).toMatchObject({ pool: { used: [], free: [] } });
  });

  test('a server that is not there is an error, not a wait', async () => {
    const nowhere = connect(inject('testRun').adminUrl.replace(/:\d+\//, ':1/'));
    try {
      await expect(nowhere.raw('select 1')).rejects.toMatchObject({ code: 'ECONNREFUSED' });
    } finally {
      await nowhere.destroy();
    }
  });
});
