import type { RelationMappings } from 'objection';
import type { Visibility } from '#domain/vocabulary.ts';
import { Casting } from './casting.ts';
import { Maker } from './maker.ts';
import { RegisterModel } from './register-model.ts';

/** One piece of iron, on a machine or on a bench. */
export class Part extends RegisterModel {
  static override readonly tableName = 'parts';

  declare id: string;
  declare holderId: string;
  declare partTypeId: string | null;
  /** By its holder's word; the casting, once known, says it for certain. */
  declare makerId: string | null;
  /** What its number leads to in the catalogue; `null`: to nothing, or to more than one entry. */
  declare castingId: string | null;
  declare visibility: Visibility;

  declare maker?: Maker | null;
  declare casting?: Casting | null;

  static override relationMappings = (): RelationMappings => ({
    maker: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Maker,
      join: { from: 'parts.makerId', to: 'makers.id' },
    },
    casting: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Casting,
      join: { from: 'parts.castingId', to: 'castings.id' },
    },
  });
}
