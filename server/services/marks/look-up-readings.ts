import type { Knex } from 'knex';
import { MarkLook } from '#db/models/mark-look.ts';
import { holderOf } from '#server/policies/marks.ts';
import { actOnRecord } from '#server/services/parts/act-on-record.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { holdMark } from './hold-mark.ts';
import { readMark } from './read-mark.ts';
import type { MarkOnRecord } from './read-mark.ts';

/**
 * Shows a member what others read, and keeps in mind that it did: what they read afterwards is not independent. A holder is shown it anyway.
 *
 * @throws ProblemError `not-signed-in`, `not-found`.
 */
export async function lookUpReadings(markId: string, context: RequestContext, knex: Knex): Promise<MarkOnRecord> {
  return actOnRecord(context, knex, async ({ member, trx }) => {
    const mark = await holdMark(member, markId, trx);
    if (holderOf(mark) !== member.id) await MarkLook.query(trx).insert({ markId, memberId: member.id }).onConflict(['markId', 'memberId']).ignore();
    return readMark(member, markId, trx);
  });
}
