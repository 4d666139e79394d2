import type { Knex } from 'knex';
import { Photo } from '#db/models/photo.ts';
import { ProblemError } from '#server/services/problem-error.ts';

/**
 * Photos stand only on their owner's own parts and marks.
 *
 * @param pathOf where in what was sent the photo at a place is named
 * @throws ProblemError `invalid` at each photo that is not there or another's: which of the two is nobody's to know.
 */
export async function requireOwnPhotos(
  memberId: string,
  photoIds: readonly string[],
  pathOf: (place: number) => readonly (string | number)[],
  trx: Knex.Transaction,
): Promise<void> {
  if (photoIds.length === 0) return;
  // Not to be taken away before this act is done.
  const own = new Set((await Photo.query(trx).where({ ownerId: memberId }).whereIn('id', [...photoIds]).forKeyShare().select('id')).map(({ id }) => id));
  const errors = photoIds.flatMap((id, place) => (own.has(id) ? [] : [{ path: [...pathOf(place)], message: 'No photo of yours has this id' }]));
  if (errors.length > 0) throw new ProblemError('invalid', 'See which, and why, under errors.', { errors });
}
