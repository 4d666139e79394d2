import type { Knex } from 'knex';
import { Mark } from '#db/models/mark.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { fittingsNow } from '#server/services/marks/load-marks.ts';
import { requireNotReadByOthers } from '#server/services/marks/read-by-others.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { actOnRecord } from './act-on-record.ts';
import { holdOwnPart } from './hold-part.ts';

/**
 * Takes a part off the record with its marks. Its photos stay.
 *
 * @throws ProblemError `not-signed-in`, `not-found`, `not-allowed`; `conflict` while it is on a machine, and where others have read a mark of it.
 */
export async function removePart(id: string, context: RequestContext, knex: Knex): Promise<void> {
  await actOnRecord(context, knex, async ({ member, trx, requestId }) => {
    const part = await holdOwnPart(member, id, trx);
    if ((await fittingsNow([id], trx)).size > 0) throw new ProblemError('conflict', 'It is on a machine. Take it off first.');
    const marks = await Mark.query(trx).where({ partId: id }).orderBy('id').forNoKeyUpdate();
    await requireNotReadByOthers(marks.map((mark) => mark.id), member.id, trx);
    await part.$query(trx).delete();
    await writeAudit({ act: 'part.removed', actorId: member.id, subject: { kind: 'part', id }, requestId }, trx);
  });
}
