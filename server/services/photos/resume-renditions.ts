import type { Knex } from 'knex';
import { Picture } from '#db/models/picture.ts';
import { enqueue } from '#server/queue/enqueue.ts';
import { makeRenditions } from '#server/queue/photo-jobs.ts';
import { withTransaction } from '#server/services/transaction.ts';

/**
 * Has the renditions made of every picture that waits for them: those whose job was lost with the server, and those that were put on record
 * without one. One that a job has in hand already gets another, which finds little or nothing left to do. Answers how many.
 */
export async function resumeRenditions(knex: Knex): Promise<number> {
  return withTransaction(knex, async (trx) => {
    const waiting = await Picture.query(trx).modify('waiting').orderBy('id').select('id');
    for (const { id } of waiting) await enqueue(makeRenditions, { pictureId: id }, trx);
    return waiting.length;
  });
}
