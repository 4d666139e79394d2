import type { Modifiers, QueryBuilder, RelationMappings } from 'objection';
import type { PhotoState, PhotoType } from '#domain/vocabulary.ts';
import { PictureFile } from './picture-file.ts';
import { RegisterModel } from './register-model.ts';

/** What the bytes of a photo are, kept once whoever sends them. */
export class Picture extends RegisterModel {
  static override readonly tableName = 'pictures';

  declare id: string;
  /** SHA-256 of the bytes as they were sent. */
  declare digest: Buffer;
  /** What its files stand under in the photo store. */
  declare storeKey: string;
  declare type: PhotoType;
  /** Of the original; a number as text. */
  declare bytes: string;
  /** Upright. */
  declare width: number;
  declare height: number;
  /** `waiting`: the original stands in the store, and its renditions as far as they are made. */
  declare state: PhotoState;
  /** Why, in a sentence; `null` unless `failed`. */
  declare failure: string | null;
  declare sentAt: string;

  declare files?: PictureFile[];

  static override relationMappings = (): RelationMappings => ({
    files: {
      relation: RegisterModel.HasManyRelation,
      modelClass: PictureFile,
      join: { from: 'pictures.id', to: 'picture_files.pictureId' },
    },
  });

  static override modifiers: Modifiers<QueryBuilder<Picture>> = {
    /** Its renditions are still to be made, or some of them. */
    waiting: (query) => query.where('pictures.state', 'waiting'),
  };
}
