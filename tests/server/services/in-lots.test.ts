import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { Knex } from 'knex';
import { connect } from '#db/connection.ts';
import { inLots } from '#server/services/in-lots.ts';
import { useDatabase } from '#tests/support/database.ts';

const database = useDatabase();
let knex: Knex;
beforeAll(() => {
  knex = connect(database.url, { poolSize: 1 });
});
afterAll(() => knex.destroy());

/** So many numbers in order, under a name of two words. */
function numbers(count: number, on: Knex): Knex.QueryBuilder {
  const query: Knex.QueryBuilder = on.queryBuilder();
  void query.select(on.raw('n as two_words')).from(on.raw('generate_series(1, ?::integer) as n', [count])).orderBy('n');
  return query;
}

async function lotsOf(query: Knex.QueryBuilder, on: Knex): Promise<readonly (readonly unknown[])[]> {
  const lots: (readonly unknown[])[] = [];
  for await (const lot of inLots(query, on)) lots.push(lot);
  return lots;
}

describe('a long query in lots', () => {
  test('gives every row once, in order, named as everywhere', async () => {
    const lots = await lotsOf(numbers(12_001, knex), knex);
    expect(lots.map(({ length }) => length)).toEqual([5_000, 5_000, 2_001]);
    expect(lots[0]?.[0]).toEqual({ twoWords: 1 });
    expect(lots[2]?.at(-1)).toEqual({ twoWords: 12_001 });
    expect((await lotsOf(numbers(5_000, knex), knex)).map(({ length }) => length)).toEqual([5_000]);
    expect(await lotsOf(numbers(0, knex), knex)).toEqual([]);
  });

  test('within a transaction sees what that wrote, and leaves it open', async () => {
    const { knex: trx } = database;
    await trx.raw('create temporary table lots_written (n integer)');
    await trx.raw('insert into lots_written values (1), (2)');
    expect(await lotsOf(trx.select('n').from('lots_written').orderBy('n'), trx)).toEqual([[{ n: 1 }, { n: 2 }]]);
    expect(trx.isCompleted()).toBe(false);
  });

  test('gives its connection back when whoever asked has enough, and when the query fails', async () => {
    for await (const lot of inLots(numbers(12_001, knex), knex)) {
      expect(lot).toHaveLength(5_000);
      break;
    }
    await expect(lotsOf(knex.select('nothing').from('makers'), knex)).rejects.toThrow('nothing');
    // The pool has one connection: it would wait for ever for another.
    expect(await knex.select(knex.raw('1 as one'))).toEqual([{ one: 1 }]);
  });
});
