import type { Modifiers, QueryBuilder, RelationMappings } from 'objection';
import { Photo } from './photo.ts';
import { RegisterModel } from './register-model.ts';

/** A photo of a part, in the order in which its holder shows them. */
export class PartPhoto extends RegisterModel {
  static override readonly tableName = 'part_photos';
  static override readonly idColumn = ['partId', 'photoId'];

  declare partId: string;
  declare photoId: string;
  declare ordinal: number;

  declare photo?: Photo;

  static override relationMappings = (): RelationMappings => ({
    photo: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Photo,
      join: { from: 'part_photos.photoId', to: 'photos.id' },
    },
  });

  static override modifiers: Modifiers<QueryBuilder<PartPhoto>> = {
    inOrder: (query) => query.orderBy('part_photos.ordinal'),
  };
}
