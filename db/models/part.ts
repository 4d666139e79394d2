import type { RelationMappings } from 'objection';
import type { Visibility } from '#domain/vocabulary.ts';
import { Casting } from './casting.ts';
import { MachineModel } from './machine-model.ts';
import { Maker } from './maker.ts';
import { PartPhoto } from './part-photo.ts';
import { PartType } from './part-type.ts';
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
  /** What its holder calls it. */
  declare called: string | null;
  /** The machine it was found on, by its holder’s word; it need not be on record. */
  declare foundModelId: string | null;
  declare foundSerial: string | null;
  declare condition: string | null;
  /** For its holder alone. */
  declare note: string | null;
  /** Grows with every change its holder makes. */
  declare revision: number;
  declare recordedAt: string;

  declare partType?: PartType | null;
  declare maker?: Maker | null;
  declare casting?: Casting | null;
  declare foundModel?: MachineModel | null;
  declare photos?: PartPhoto[];

  static override relationMappings = (): RelationMappings => ({
    partType: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: PartType,
      join: { from: 'parts.partTypeId', to: 'part_types.id' },
    },
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
    foundModel: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: MachineModel,
      join: { from: 'parts.foundModelId', to: 'models.id' },
    },
    photos: {
      relation: RegisterModel.HasManyRelation,
      modelClass: PartPhoto,
      modify: 'inOrder',
      join: { from: 'parts.id', to: 'part_photos.partId' },
    },
  });
}
