import type { Knex } from 'knex';
import { MarkLook } from '#db/models/mark-look.ts';
import { Part } from '#db/models/part.ts';
import { Photo } from '#db/models/photo.ts';

/**
 * What becomes of a member's parts, marks and photos when their account is closed. Private parts that nobody else has read a mark of go, and photos
 * that then stand on nothing. The rest is the register's, without what was for its holder alone: notes and the files' own names. Readings stay with
 * the marks they were made of, under a former member.
 */
export async function letGoOfParts(holderId: string, trx: Knex.Transaction): Promise<void> {
  const ofOthers = trx('marks').join('readings', 'readings.markId', 'marks.id').whereNot('readings.readerId', holderId).whereNotNull('marks.partId').select('marks.partId');
  await Part.query(trx).delete().where({ holderId }).whereNot({ visibility: 'public' }).whereNotIn('id', ofOthers);
  await Part.query(trx).patch({ note: null }).where({ holderId });

  await Photo.query(trx)
    .delete()
    .where({ ownerId: holderId })
    .whereNotIn('id', trx('part_photos').select('photoId'))
    .whereNotIn('id', trx('mark_photos').select('photoId'));
  await Photo.query(trx).patch({ name: null }).where({ ownerId: holderId });
  await MarkLook.query(trx).delete().where({ memberId: holderId });
}
