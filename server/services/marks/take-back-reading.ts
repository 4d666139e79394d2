import type { Knex } from 'knex';
import { Reading } from '#db/models/reading.ts';
import { isHidden } from '#server/policies/marks.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import type { CipherCache } from '#server/services/cipher-cache.ts';
import { actOnRecord } from '#server/services/parts/act-on-record.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { workOutOnePart } from '#server/services/reworks/work-out-one-part.ts';
import { acquaintances } from './acquaintances.ts';
import { holdMark } from './hold-mark.ts';
import { readMark } from './read-mark.ts';
import type { MarkOnRecord } from './read-mark.ts';
import { settleMark } from './settle-mark.ts';

/**
 * Takes back a reading: it stays on record as taken back and no longer counts. One that was taken back already stays so.
 *
 * @throws ProblemError `not-signed-in`, `not-found`; `not-allowed` for another's.
 */
export async function takeBackReading(id: string, context: RequestContext, ciphers: CipherCache, knex: Knex): Promise<MarkOnRecord> {
  return actOnRecord(context, knex, async ({ member, trx, requestId }) => {
    const named = await Reading.query(trx).findById(id).select('markId');
    if (named === undefined) throw notThere();
    const { markId } = named;
    const mark = await holdMark(member, markId, trx);
    const reading = await Reading.query(trx).findById(id);
    if (reading === undefined) throw notThere();
    if (reading.readerId !== member.id) {
      throw isHidden(member, (await acquaintances(member, [mark], trx))(mark)) ? notThere() : new ProblemError('not-allowed', 'Only whoever made a reading takes it back.');
    }
    if (reading.takenBackAt === null) {
      // Not the moment the transaction began: the reading may have been made since.
      await reading.$query(trx).patch({ takenBackAt: trx.raw('clock_timestamp()') });
      await settleMark(markId, trx);
      if (mark.partId !== null) await workOutOnePart(mark.partId, ciphers, trx);
      await writeAudit({ act: 'reading.taken-back', actorId: member.id, subject: { kind: 'reading', id }, detail: { markId }, requestId }, trx);
    }
    return readMark(member, markId, trx);
  });
}

function notThere(): ProblemError {
  return new ProblemError('not-found', 'No reading of this id is for you to see.');
}
