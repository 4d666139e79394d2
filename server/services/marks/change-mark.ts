import type { Knex } from 'knex';
import { MarkDecoding } from '#db/models/mark-decoding.ts';
import type { MarkKind, MarkTechnique } from '#domain/vocabulary.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import type { CipherCache } from '#server/services/cipher-cache.ts';
import { actOnRecord } from '#server/services/parts/act-on-record.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { requireRevision } from '#server/services/require-revision.ts';
import { workOutOnePart } from '#server/services/reworks/work-out-one-part.ts';
import { holdOwnMark } from './hold-mark.ts';
import { readMark } from './read-mark.ts';
import type { MarkOnRecord } from './read-mark.ts';

type MarkChange = { readonly kind: MarkKind; readonly technique: MarkTechnique; readonly revision: number };

/**
 * Says otherwise what kind of mark it is; its readings stay as they are.
 *
 * @throws ProblemError `not-signed-in`, `not-found`, `not-allowed`; `conflict` where it was changed since that revision.
 */
export async function changeMark(id: string, { kind, technique, revision }: MarkChange, context: RequestContext, ciphers: CipherCache, knex: Knex): Promise<MarkOnRecord> {
  return actOnRecord(context, knex, async ({ member, trx, requestId }) => {
    const mark = await holdOwnMark(member, id, trx);
    requireRevision(mark, revision);
    await mark.$query(trx).patch({ kind, technique, revision: revision + 1 });
    // Only date codes are dated; the part is worked out without it.
    if (kind !== 'date-code') await MarkDecoding.query(trx).deleteById(id);
    await workOutOnePart(mark.partId, ciphers, trx);
    await writeAudit({ act: 'mark.changed', actorId: member.id, subject: { kind: 'mark', id }, detail: { kind, technique }, requestId }, trx);
    return readMark(member, id, trx);
  });
}
