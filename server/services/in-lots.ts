import { randomBytes } from 'node:crypto';
import type { Knex } from 'knex';
import { snakeCaseMappers } from 'objection';
import { z } from 'zod';

const Answer = z.object({ rows: z.array(z.record(z.string(), z.unknown())) });

/** Knex names the columns of a statement it did not put together as the database does. */
const names = snakeCaseMappers();

/** As the statement says it, which takes no number from elsewhere. */
const ROWS_IN_A_LOT = 5_000;
const FETCH_A_LOT = 'fetch forward 5000 from ??';

/** The first lot of a long query may take as long as all of it, and whoever asks may be long about each. */
const PATIENCE = '60s';

/**
 * The rows of a long query, some thousands at a time, by a cursor: worked out once, of one moment, and never all in memory. Inside a transaction
 * it belongs to that; otherwise to one of its own, which ends with the last row or when whoever asked has enough.
 */
export async function* inLots(query: Knex.QueryBuilder, knex: Knex): AsyncGenerator<readonly unknown[]> {
  const own = knex.isTransaction === true ? null : await knex.transaction();
  const trx = own ?? knex;
  const cursor = `lots_${randomBytes(6).toString('hex')}`;
  try {
    if (own !== null) await prepare(own);
    await trx.raw(`declare ?? no scroll cursor for ?`, [cursor, query]);
    for (;;) {
      const { rows } = Answer.parse(await trx.raw(FETCH_A_LOT, [cursor]));
      if (rows.length > 0) yield rows.map((row) => names.parse(row));
      if (rows.length < ROWS_IN_A_LOT) break;
    }
    await trx.raw('close ??', [cursor]);
  } finally {
    await own?.rollback();
  }
}

async function prepare(trx: Knex.Transaction): Promise<void> {
  for (const limit of ['statement_timeout', 'idle_in_transaction_session_timeout']) await trx.raw('select set_config(?, ?, true)', [limit, PATIENCE]);
  // All rows are wanted: the plan that has the first ones soonest is not the best.
  await trx.raw(`select set_config('cursor_tuple_fraction', '1', true)`);
}
