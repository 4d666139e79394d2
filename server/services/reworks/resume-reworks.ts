import type { Knex } from 'knex';
import { Rework } from '#db/models/rework.ts';
import { enqueue } from '#server/queue/enqueue.ts';
import { runRework } from '#server/queue/rework-jobs.ts';
import { withTransaction } from '#server/services/transaction.ts';

/**
 * Takes up every rework that is not done, those that failed too: whatever kept them may be mended. One that a job has in hand already
 * gets another, which finds nothing left to do. Answers how many.
 */
export async function resumeReworks(knex: Knex): Promise<number> {
  return withTransaction(knex, async (trx) => {
    await Rework.query(trx).where({ state: 'failed' }).patch({ state: 'waiting' });
    const unfinished = await Rework.query(trx).whereNot({ state: 'done' }).orderBy('id').select('id');
    for (const { id } of unfinished) await enqueue(runRework, { reworkId: id }, trx);
    return unfinished.length;
  });
}
