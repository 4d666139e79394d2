import type { QueryBuilder } from 'objection';
import { MarkPhoto } from '#db/models/mark-photo.ts';
import { PartPhoto } from '#db/models/part-photo.ts';
import type { Photo } from '#db/models/photo.ts';

/** Photos that stand on no part and no mark. */
export function onNothing(query: QueryBuilder<Photo>): void {
  void query
    .whereNotExists(PartPhoto.query().whereColumn('part_photos.photoId', 'photos.id'))
    .whereNotExists(MarkPhoto.query().whereColumn('mark_photos.photoId', 'photos.id'));
}
