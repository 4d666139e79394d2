import type { Knex } from 'knex';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import type { CipherCache } from '#server/services/cipher-cache.ts';
import { actOnRecord } from '#server/services/parts/act-on-record.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { workOutOnePart } from '#server/services/reworks/work-out-one-part.ts';
import { holdOwnMark } from './hold-mark.ts';
import { requireNotReadByOthers } from './read-by-others.ts';

/**
 * Takes a mark off the record with its holder's readings. Its photos stay.
 *
 * @throws ProblemError `not-signed-in`, `not-found`, `not-allowed`; `conflict` where others have read it.
 */
export async function removeMark(id: string, context: RequestContext, ciphers: CipherCache, knex: Knex): Promise<void> {
  await actOnRecord(context, knex, async ({ member, trx, requestId }) => {
    const mark = await holdOwnMark(member, id, trx);
    await requireNotReadByOthers([id], member.id, trx);
    await mark.$query(trx).delete();
    await workOutOnePart(mark.partId, ciphers, trx);
    await writeAudit({ act: 'mark.removed', actorId: member.id, subject: { kind: 'mark', id }, detail: { partId: mark.partId }, requestId }, trx);
  });
}
