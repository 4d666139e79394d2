import type { RelationMappings } from 'objection';
import { Picture } from './picture.ts';
import { RegisterModel } from './register-model.ts';

/** A member's own of a picture. */
export class Photo extends RegisterModel {
  static override readonly tableName = 'photos';

  declare id: string;
  declare ownerId: string;
  declare pictureId: string;
  /** What its files are found under by whoever may see it; nobody can guess it. */
  declare address: string;
  /** The file's own name, as text; `null`: it had none that says anything. */
  declare name: string | null;
  /** The day the camera noted, `YYYY-MM-DD`; kept only where its owner said so. */
  declare takenOn: string | null;
  declare addedAt: string;

  declare picture?: Picture;

  static override relationMappings = (): RelationMappings => ({
    picture: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Picture,
      join: { from: 'photos.pictureId', to: 'pictures.id' },
    },
  });
}
