import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import { MarkPhoto } from '#db/models/mark-photo.ts';
import { Reading } from '#db/models/reading.ts';
import { readsIndependently } from '#server/policies/marks.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import type { CipherCache } from '#server/services/cipher-cache.ts';
import { actOnRecord } from '#server/services/parts/act-on-record.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { workOutOnePart } from '#server/services/reworks/work-out-one-part.ts';
import { wrongValue } from '#server/services/wrong-value.ts';
import { acquaintances } from './acquaintances.ts';
import { holdMark } from './hold-mark.ts';
import { readMark } from './read-mark.ts';
import type { MarkOnRecord } from './read-mark.ts';
import { settleMark } from './settle-mark.ts';
import { tellHolder } from './tell-holder.ts';
import { typedReading } from './typed-reading.ts';

/** Readings of one mark by one member: none is overwritten, and nobody needs more. */
const MOST_EACH = 20;

type NewReading = {
  /** In the mark notation. */
  readonly text: string;
  /** The photo it was read from; `null`: from the iron. */
  readonly photoId: string | null;
};

/**
 * Puts on record what a member reads at a mark, and works out at once what follows from it. Whether it is independent is told from what they had
 * been shown by then.
 *
 * @throws ProblemError `not-signed-in`, `not-found`; `invalid` at `text` or `photoId`; `conflict` for whoever read it twenty times.
 */
export async function makeReading(markId: string, { text, photoId }: NewReading, context: RequestContext, ciphers: CipherCache, knex: Knex): Promise<MarkOnRecord> {
  return actOnRecord(context, knex, async ({ member, trx, requestId }) => {
    const mark = await holdMark(member, markId, trx);
    const acquaintance = (await acquaintances(member, [mark], trx))(mark);
    const earlier = await Reading.query(trx).where({ markId, readerId: member.id }).resultSize();
    if (earlier >= MOST_EACH) throw new ProblemError('conflict', `You have read this mark ${MOST_EACH} times. Take one back if it is wrong.`);
    if (photoId !== null && !(await MarkPhoto.query(trx).findById([markId, photoId]))) throw wrongValue(['photoId'], 'The mark has no photo of this id');

    const reading = await Reading.query(trx).insertAndFetch({
      id: uuidV7(),
      markId,
      readerId: member.id,
      text: typedReading(text, 'text'),
      photoId,
      independent: readsIndependently(acquaintance),
      asHolder: acquaintance.isHolder,
    });
    await settleMark(markId, trx);
    if (mark.partId !== null) await workOutOnePart(mark.partId, ciphers, trx);
    await writeAudit({ act: 'reading.made', actorId: member.id, subject: { kind: 'reading', id: reading.id }, detail: { markId }, requestId }, trx);
    await tellHolder(reading, mark, trx);
    return readMark(member, markId, trx);
  });
}
