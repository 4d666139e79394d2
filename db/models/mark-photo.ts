import type { Modifiers, QueryBuilder, RelationMappings } from 'objection';
import { Photo } from './photo.ts';
import { RegisterModel } from './register-model.ts';

/** How a mark stands on a photo. */
export class MarkPhoto extends RegisterModel {
  static override readonly tableName = 'mark_photos';
  static override readonly idColumn = ['markId', 'photoId'];

  declare markId: string;
  declare photoId: string;
  declare ordinal: number;
  /** Shares of the upright picture’s width and height, from its upper left corner; these four are `null` together. */
  declare regionLeft: number | null;
  declare regionTop: number | null;
  declare regionWidth: number | null;
  declare regionHeight: number | null;
  /** Degrees clockwise that make it read. */
  declare turn: number;
  /** Read in the mirror. */
  declare mirrored: boolean;

  declare photo?: Photo;

  static override relationMappings = (): RelationMappings => ({
    photo: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Photo,
      join: { from: 'mark_photos.photoId', to: 'photos.id' },
    },
  });

  static override modifiers: Modifiers<QueryBuilder<MarkPhoto>> = {
    inOrder: (query) => query.orderBy('mark_photos.ordinal'),
  };
}
