import type { RelationMappings } from 'objection';
import type { DateRange } from '#db/ranges.ts';
import { CastingPartNumber } from './casting-part-number.ts';
import { CastingTell } from './casting-tell.ts';
import { CatalogueModel, factRelations } from './catalogue-model.ts';
import { Maker } from './maker.ts';
import { PartType } from './part-type.ts';

/** The catalogue's entry for a casting number. */
export class Casting extends CatalogueModel {
  static override readonly tableName = 'castings';
  static override readonly ranges = ['made'];

  declare makerId: string;
  /** The foundry, where it was not the maker's own or is known to have been. */
  declare pouredById: string | null;
  declare partTypeId: string;
  declare slug: string;
  /** As it stands on the casting, in capitals. */
  declare number: string;
  /** The number's letters and digits alone; worked out by the database. */
  declare readonly numberKey: string;
  declare pattern: string | null;
  declare made: DateRange | null;
  declare note: string | null;

  declare maker?: Maker;
  declare pouredBy?: Maker | null;
  declare partType?: PartType;
  declare tells?: CastingTell[];
  declare partNumbers?: CastingPartNumber[];

  static override relationMappings = (): RelationMappings => ({
    ...factRelations('castings'),
    maker: {
      relation: CatalogueModel.BelongsToOneRelation,
      modelClass: Maker,
      join: { from: 'castings.makerId', to: 'makers.id' },
    },
    pouredBy: {
      relation: CatalogueModel.BelongsToOneRelation,
      modelClass: Maker,
      join: { from: 'castings.pouredById', to: 'makers.id' },
    },
    partType: {
      relation: CatalogueModel.BelongsToOneRelation,
      modelClass: PartType,
      join: { from: 'castings.partTypeId', to: 'part_types.id' },
    },
    tells: {
      relation: CatalogueModel.HasManyRelation,
      modelClass: CastingTell,
      modify: 'inOrder',
      join: { from: 'castings.id', to: 'casting_tells.castingId' },
    },
    partNumbers: {
      relation: CatalogueModel.HasManyRelation,
      modelClass: CastingPartNumber,
      modify: 'inOrder',
      join: { from: 'castings.id', to: 'casting_part_numbers.castingId' },
    },
  });
}
