import type { Knex } from 'knex';
import { Reading } from '#db/models/reading.ts';
import { ProblemError } from '#server/services/problem-error.ts';

/**
 * What others read stays on record, also what they took back.
 *
 * @throws ProblemError `conflict` where anybody but the member ever read one of the marks.
 */
export async function requireNotReadByOthers(markIds: readonly string[], memberId: string, trx: Knex.Transaction): Promise<void> {
  const byOthers = await Reading.query(trx).whereIn('markId', [...markIds]).whereNot({ readerId: memberId }).resultSize();
  if (byOthers > 0) throw new ProblemError('conflict', 'Others have read it, and their readings are kept. You can make the part private instead.');
}
