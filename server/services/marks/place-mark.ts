import type { Knex } from 'knex';
import { PHOTO_LIMITS } from '#contract/photos.ts';
import { MarkPhoto } from '#db/models/mark-photo.ts';
import { Photo } from '#db/models/photo.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { actOnRecord } from '#server/services/parts/act-on-record.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { holdOwnMark } from './hold-mark.ts';
import { placedColumns } from './placed-columns.ts';
import type { Placing } from './placed-columns.ts';
import { readMark } from './read-mark.ts';
import type { MarkOnRecord } from './read-mark.ts';
import { settleMark } from './settle-mark.ts';

type OfPhoto = { readonly id: string; readonly photoId: string };

/**
 * Says where on a photo of one's own a mark stands, and how to turn the photo so that it reads. A photo that was not one of the mark becomes its last.
 *
 * @throws ProblemError `not-signed-in`; `not-found` for the mark, and for a photo that is not there or another's; `not-allowed`; `conflict` for a
 *   mark that has twelve photos.
 */
export async function placeMark({ id, photoId }: OfPhoto, placing: Placing, context: RequestContext, knex: Knex): Promise<MarkOnRecord> {
  return actOnRecord(context, knex, async ({ member, trx, requestId }) => {
    await holdOwnMark(member, id, trx);
    const photo = await Photo.query(trx).findById(photoId).where({ ownerId: member.id }).forKeyShare();
    if (photo === undefined) throw new ProblemError('not-found', 'No photo of yours has this id.');
    const placed = await MarkPhoto.query(trx).where({ markId: id });
    if (placed.some((one) => one.photoId === photoId)) await MarkPhoto.query(trx).findById([id, photoId]).patch(placedColumns(placing));
    else if (placed.length >= PHOTO_LIMITS.ofMark) throw new ProblemError('conflict', `The mark has ${PHOTO_LIMITS.ofMark} photos, and takes no more.`);
    else await MarkPhoto.query(trx).insert({ markId: id, photoId, ordinal: Math.max(-1, ...placed.map(({ ordinal }) => ordinal)) + 1, ...placedColumns(placing) });
    await settleMark(id, trx);
    await writeAudit({ act: 'mark.placed', actorId: member.id, subject: { kind: 'mark', id }, detail: { photoId }, requestId }, trx);
    return readMark(member, id, trx);
  });
}
