import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import { PART_LIMITS } from '#contract/parts.ts';
import type { PartForm } from '#contract/parts.ts';
import { Part } from '#db/models/part.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import type { CipherCache } from '#server/services/cipher-cache.ts';
import { addMark } from '#server/services/marks/record-mark.ts';
import { typedReading } from '#server/services/marks/typed-reading.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { workOutOnePart } from '#server/services/reworks/work-out-one-part.ts';
import { actOnRecord } from './act-on-record.ts';
import { readPart } from './read-part.ts';
import type { PartOnRecord } from './read-part.ts';
import { checkedPart, writePartPhotos } from './write-part.ts';

/** With its casting number as read, in the mark notation. */
type NewPart = PartForm & { readonly number: string | null };

/**
 * Puts a part on record, held by the member.
 *
 * @throws ProblemError `not-signed-in`; `invalid` at what names nothing, and at `number`; `conflict` for whoever has five thousand parts.
 */
export async function recordPart({ number, ...form }: NewPart, context: RequestContext, ciphers: CipherCache, knex: Knex): Promise<PartOnRecord> {
  return actOnRecord(context, knex, async (act) => {
    const { member, trx, requestId } = act;
    const parts = await Part.query(trx).where({ holderId: member.id }).resultSize();
    if (parts >= PART_LIMITS.each) throw new ProblemError('conflict', `You have ${PART_LIMITS.each} parts on record, which is as many as one member may have.`);
    const reading = number === null ? null : typedReading(number, 'number');
    const id = uuidV7();
    await Part.query(trx).insert({ id, holderId: member.id, castingId: null, ...(await checkedPart(form, member.id, trx)) });
    await writePartPhotos(id, form.photoIds, trx);
    await writeAudit({ act: 'part.recorded', actorId: member.id, subject: { kind: 'part', id }, requestId }, trx);
    if (reading !== null) await addMark({ partId: id, kind: 'casting-number', technique: 'cast', reading, photos: [] }, act);
    await workOutOnePart(id, ciphers, trx);
    return readPart(member, id, trx);
  });
}
