import type { Knex } from 'knex';
import type { PictureFile } from '#db/models/picture-file.ts';
import { Photo } from '#db/models/photo.ts';
import { keyOf } from '#server/files/photo-store.ts';
import { fileNameOf, parseFileName } from '#server/files/rendition-names.ts';
import { onPublic, visibleTo } from '#server/policies/photos.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { ProblemError } from '#server/services/problem-error.ts';

export type PhotoFile = {
  /** In the store. */
  readonly key: string;
  readonly file: PictureFile;
  /** Whether it stands on something everybody may see. */
  readonly isPublic: boolean;
};

/**
 * A file of a photo by the address it is served at.
 *
 * @throws ProblemError `not-found`, the same for one that is not there and for one the viewer may not know of.
 */
export async function findPhotoFile(viewer: Viewer, address: string, name: string, knex: Knex): Promise<PhotoFile> {
  const wanted = parseFileName(name);
  const photo = wanted === null ? undefined : await Photo.query(knex).modify(visibleTo(viewer)).findOne('photos.address', address).withGraphFetched('picture.files');
  const file = photo?.picture?.files?.find((one) => wanted !== null && fileNameOf(one) === fileNameOf(wanted));
  if (photo?.picture === undefined || file === undefined) throw new ProblemError('not-found', 'There is nothing at this address.');
  const isPublic = (await Photo.query(knex).modify(onPublic).findById(photo.id).select('photos.id')) !== undefined;
  return { key: keyOf(photo.picture.storeKey, name), file, isPublic };
}
