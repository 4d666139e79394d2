import type { Knex } from 'knex';
import { Photo } from '#db/models/photo.ts';
import { visibleTo } from '#server/policies/photos.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { ProblemError } from '#server/services/problem-error.ts';

/** What a photo is presented from. */
export const PHOTO_GRAPH = 'picture.files';

/**
 * A photo the viewer may see, with the renditions made so far.
 *
 * @throws ProblemError `not-found`, the same for one that is not there and for one the viewer may not know of.
 */
export async function readPhoto(viewer: Viewer, id: string, knex: Knex): Promise<Photo> {
  const photo = await Photo.query(knex).modify(visibleTo(viewer)).findById(id).withGraphFetched(PHOTO_GRAPH);
  if (photo === undefined) throw new ProblemError('not-found', 'No photo of this id is for you to see.');
  return photo;
}
