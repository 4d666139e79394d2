import type { Knex } from 'knex';
import { z } from 'zod';
import { PHOTO_LIMITS } from '#contract/photos.ts';
import { Photo } from '#db/models/photo.ts';
import { ProblemError } from '#server/services/problem-error.ts';

const Had = z.tuple([z.object({ photos: z.string().transform(Number), bytes: z.number().nullable().transform((sum) => sum ?? 0) })]);

/**
 * Whether a member may have another photo of so many bytes. Counted and then relied on, so whoever adds one holds `lockPhotosOf` first.
 *
 * @throws ProblemError `too-large`.
 */
export async function requireRoom(memberId: string, bytes: number, knex: Knex): Promise<void> {
  const { each } = PHOTO_LIMITS;
  const rows: unknown = await Photo.query(knex)
    .where({ ownerId: memberId })
    .joinRelated('picture')
    .count('*', { as: 'photos' })
    .sum('picture.bytes as bytes')
    .castTo<unknown[]>();
  const [had] = Had.parse(rows);
  if (had.photos >= each.photos) throw new ProblemError('too-large', `You have ${had.photos} photos on record, which is as many as one member may have. Remove some first.`);
  if (had.bytes + bytes > each.bytes) {
    throw new ProblemError('too-large', `Your photos come to ${gigabytes(had.bytes)}, and one member may have ${gigabytes(each.bytes)}. Remove some first.`);
  }
}

/** Holds the member's photos until the transaction ends, so that no two additions count the same ones. */
export async function lockPhotosOf(memberId: string, trx: Knex.Transaction): Promise<void> {
  await trx.raw(`select pg_advisory_xact_lock(hashtextextended('photos of ' || ?, 0))`, [memberId]);
}

function gigabytes(bytes: number): string {
  return `${(bytes / 1024 ** 3).toFixed(1)} GiB`;
}
