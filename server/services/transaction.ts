import type { Knex } from 'knex';
import { takeKey, writeKey } from './only-once.ts';

const MOST_RUNS = 5;
/** Milliseconds before the second run; each further wait is up to twice as long. */
const FIRST_WAIT = 10;

/** SQLSTATEs of a transaction that lost to another and would do if it ran again: serialization failure, deadlock. */
const LOST = new Set(['40001', '40P01']);

export type TransactionOptions = {
  /** Whose act it is, for the database's own eyes (`app.actor_id`). */
  readonly actorId?: string;
};

/**
 * Runs the work in one transaction, again from its beginning where it lost to another one, at most five times in all. So the work
 * does nothing that a rollback would not undo. Inside a transaction it becomes a savepoint and runs once: only the whole can be run again.
 * The first transaction of a request that is to be done only once also writes that request's key.
 */
export async function withTransaction<Answer>(
  knex: Knex,
  work: (trx: Knex.Transaction) => Promise<Answer>,
  { actorId }: TransactionOptions = {},
): Promise<Answer> {
  const key = takeKey();
  const mostRuns = knex.isTransaction === true ? 1 : MOST_RUNS;
  for (let run = 1; ; run += 1) {
    try {
      return await knex.transaction(async (trx) => {
        if (actorId !== undefined) await trx.raw(`select set_config('app.actor_id', ?, true)`, [actorId]);
        if (key !== undefined) await writeKey(key, trx);
        return work(trx);
      });
    } catch (error) {
      if (run >= mostRuns || !hasLost(error)) throw error;
      await wait(FIRST_WAIT * 2 ** (run - 1) * (1 + Math.random()));
    }
  }
}

function hasLost(error: unknown): boolean {
  if (!(error instanceof Error)) return false;
  const native = 'nativeError' in error ? error.nativeError : error;
  return typeof native === 'object' && native !== null && 'code' in native && typeof native.code === 'string' && LOST.has(native.code);
}

function wait(milliseconds: number): Promise<void> {
  return new Promise((resolve) => {
    setTimeout(resolve, milliseconds);
  });
}
