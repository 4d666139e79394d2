import type { Knex } from 'knex';
import { Photo } from '#db/models/photo.ts';
import { signedIn } from '#server/policies/viewer.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { onNothing } from './on-nothing.ts';
import { PHOTO_GRAPH } from './read-photo.ts';

/** As many as one screen takes; the rest come up as these are used or swept. */
const MOST = 200;

/**
 * A member's photos that stand on nothing yet, newest first.
 *
 * @throws ProblemError `not-signed-in`.
 */
export async function listUnusedPhotos(viewer: Viewer, knex: Knex): Promise<readonly Photo[]> {
  const { id } = signedIn(viewer);
  return Photo.query(knex)
    .where('photos.ownerId', id)
    .modify(onNothing)
    .orderBy([
      { column: 'photos.addedAt', order: 'desc' },
      { column: 'photos.id', order: 'desc' },
    ])
    .limit(MOST)
    .withGraphFetched(PHOTO_GRAPH);
}
