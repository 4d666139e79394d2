import type { Knex } from 'knex';
import type { PartForm } from '#contract/parts.ts';
import { Mark } from '#db/models/mark.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import type { CipherCache } from '#server/services/cipher-cache.ts';
import { settleMark } from '#server/services/marks/settle-mark.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { requireRevision } from '#server/services/require-revision.ts';
import { workOutOnePart } from '#server/services/reworks/work-out-one-part.ts';
import { actOnRecord } from './act-on-record.ts';
import { holdOwnPart } from './hold-part.ts';
import { readPart } from './read-part.ts';
import type { PartOnRecord } from './read-part.ts';
import { checkedPart, writePartPhotos } from './write-part.ts';

type PartChange = PartForm & { readonly revision: number };

/**
 * Says otherwise what a part is. Where it becomes public or private, its marks come to want readings or cease to.
 *
 * @throws ProblemError `not-signed-in`, `not-found`, `not-allowed`; `invalid` at what names nothing; `conflict` where it was changed since that revision.
 */
export async function changePart(id: string, { revision, ...form }: PartChange, context: RequestContext, ciphers: CipherCache, knex: Knex): Promise<PartOnRecord> {
  return actOnRecord(context, knex, async ({ member, trx, requestId }) => {
    const part = await holdOwnPart(member, id, trx);
    requireRevision(part, revision);
    const now = await checkedPart(form, member.id, trx);
    await part.$query(trx).patch({ ...now, revision: revision + 1 });
    await writePartPhotos(id, form.photoIds, trx);
    for (const mark of await Mark.query(trx).where({ partId: id }).orderBy('id').select('id')) await settleMark(mark.id, trx);
    await workOutOnePart(id, ciphers, trx);
    await writeAudit({ act: 'part.changed', actorId: member.id, subject: { kind: 'part', id }, detail: { visibility: now.visibility }, requestId }, trx);
    return readPart(member, id, trx);
  });
}
