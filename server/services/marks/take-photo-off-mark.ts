import type { Knex } from 'knex';
import { MarkPhoto } from '#db/models/mark-photo.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { actOnRecord } from '#server/services/parts/act-on-record.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { holdOwnMark } from './hold-mark.ts';
import { readMark } from './read-mark.ts';
import type { MarkOnRecord } from './read-mark.ts';
import { settleMark } from './settle-mark.ts';

type OfPhoto = { readonly id: string; readonly photoId: string };

/**
 * Takes a photo off a mark. The photo stays.
 *
 * @throws ProblemError `not-signed-in`; `not-found` for the mark, and for a photo that is not one of it; `not-allowed`.
 */
export async function takePhotoOffMark({ id, photoId }: OfPhoto, context: RequestContext, knex: Knex): Promise<MarkOnRecord> {
  return actOnRecord(context, knex, async ({ member, trx, requestId }) => {
    await holdOwnMark(member, id, trx);
    const taken = await MarkPhoto.query(trx).deleteById([id, photoId]);
    if (taken === 0) throw new ProblemError('not-found', 'The mark has no photo of this id.');
    await settleMark(id, trx);
    await writeAudit({ act: 'mark.changed', actorId: member.id, subject: { kind: 'mark', id }, detail: { photoTakenOff: photoId }, requestId }, trx);
    return readMark(member, id, trx);
  });
}
