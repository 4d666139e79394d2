import type { Knex } from 'knex';
import { MarkPhoto } from '#db/models/mark-photo.ts';
import { Photo } from '#db/models/photo.ts';
import type { PhotoMeans } from '#server/files/photo-means.ts';
import { isOwner, visibleTo } from '#server/policies/photos.ts';
import { signedIn } from '#server/policies/viewer.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { settleMark } from '#server/services/marks/settle-mark.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { dropPictureIfUnused } from './drop-picture.ts';
import { removeFilesOf } from './remove-files-of.ts';

type Means = Pick<PhotoMeans, 'store'> & { readonly knex: Knex };

/**
 * Takes a member's photo off the record and away from all it stands on. Its files go once no other member has a photo of the same bytes.
 *
 * @throws ProblemError `not-signed-in`, `not-found`; `not-allowed` for somebody else's public one.
 */
export async function removePhoto(viewer: Viewer, id: string, requestId: string, { knex, store }: Means): Promise<void> {
  const member = signedIn(viewer);
  const dropped = await withTransaction(
    knex,
    async (trx) => {
      const photo = await Photo.query(trx).modify(visibleTo(member)).findById(id).forUpdate();
      if (photo === undefined) throw new ProblemError('not-found', 'No photo of this id is for you to see.');
      if (!isOwner(member, photo)) throw new ProblemError('not-allowed', 'Only whoever added a photo takes it away.');
      const marks = await MarkPhoto.query(trx).where({ photoId: id }).orderBy('markId');
      await photo.$query(trx).delete();
      // One after another in the order of their ids, so that no two removals wait for each other.
      for (const { markId } of marks) await settleMark(markId, trx);
      await writeAudit({ act: 'photo.removed', actorId: member.id, subject: { kind: 'photo', id }, requestId }, trx);
      return dropPictureIfUnused(photo.pictureId, trx);
    },
    { actorId: member.id },
  );
  // The photo is gone whatever becomes of its files; what can't be removed now is swept later.
  if (dropped !== null) await removeFilesOf(dropped, store).catch(() => undefined);
}
