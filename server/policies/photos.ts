import type { QueryBuilder } from 'objection';
import { MarkPhoto } from '#db/models/mark-photo.ts';
import { PartPhoto } from '#db/models/part-photo.ts';
import type { Photo } from '#db/models/photo.ts';
import { TELLS_SERIAL } from './marks.ts';
import type { Viewer } from './viewer.ts';

/** Whether the photo is theirs. */
export function isOwner(viewer: Viewer, { ownerId }: Pick<Photo, 'ownerId'>): boolean {
  return viewer.kind === 'member' && viewer.id === ownerId;
}

/**
 * Photos the viewer may see: their own, and those that stand on something public. A photo of a serial or plate on a machine whose owner doesn't
 * show that stays theirs. Any other is not found, the same as one that is not there.
 */
export function visibleTo(viewer: Viewer): (query: QueryBuilder<Photo>) => void {
  return (query) => {
    void query.where((one) => {
      void one.modify(onPublic);
      if (viewer.kind === 'member') void one.orWhere('photos.ownerId', viewer.id);
    });
  };
}

/** Photos that stand on a public part, on a mark of one, or on a mark of a public machine. */
export function onPublic(query: QueryBuilder<Photo>): void {
  const ofPart = PartPhoto.query()
    .join('parts', 'parts.id', 'part_photos.partId')
    .whereColumn('part_photos.photoId', 'photos.id')
    .where('parts.visibility', 'public');
  const ofMark = MarkPhoto.query()
    .join('marks', 'marks.id', 'mark_photos.markId')
    .leftJoin('parts', 'parts.id', 'marks.partId')
    .leftJoin('machines', 'machines.id', 'marks.machineId')
    .whereColumn('mark_photos.photoId', 'photos.id')
    .where((one) => {
      void one.where('parts.visibility', 'public').orWhere((machine) => {
        void machine
          .where('machines.visibility', 'public')
          .where((shown) => void shown.where('machines.serialShown', true).orWhereNotIn('marks.kind', [...TELLS_SERIAL]));
      });
    });
  void query.where((one) => void one.whereExists(ofPart).orWhereExists(ofMark));
}
