import type { Knex } from 'knex';
import { Photo } from '#db/models/photo.ts';
import { Picture } from '#db/models/picture.ts';

/** A picture that is off the record, and the files it had in the store. */
export type DroppedPicture = Pick<Picture, 'storeKey'> & { readonly files: NonNullable<Picture['files']> };

/** Takes a picture off the record if nobody has a photo of it any more. Its files are for the caller to remove once that is committed. */
export async function dropPictureIfUnused(pictureId: string, trx: Knex.Transaction): Promise<DroppedPicture | null> {
  // Held against whoever is about to make a photo of it.
  const picture = await Picture.query(trx).findById(pictureId).forUpdate();
  if (picture === undefined || (await Photo.query(trx).where({ pictureId }).resultSize()) > 0) return null;
  const files = await picture.$relatedQuery('files', trx);
  await picture.$query(trx).delete();
  return { storeKey: picture.storeKey, files };
}
