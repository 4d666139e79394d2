import type { Modifiers, QueryBuilder, RelationMappings } from 'objection';
import type { CountRange } from '#db/ranges.ts';
import { CatalogueModel, factRelations } from './catalogue-model.ts';
import { MachineModel } from './machine-model.ts';
import { PartType } from './part-type.ts';

/** A place on a model that a part goes; a model's positions in order are its checklist. */
export class Position extends CatalogueModel {
  static override readonly tableName = 'positions';
  static override readonly ranges = ['lead'];

  declare modelId: string;
  declare partTypeId: string;
  /** Unique within the model. */
  declare slug: string;
  declare name: string;
  /** Its place on the checklist, from 1. */
  declare ordinal: number;
  declare weight: number;
  /** Days from casting to assembly that are accepted; `null` where no source says. Always stands on a source of field `lead`. */
  declare lead: CountRange | null;
  declare note: string | null;

  declare model?: MachineModel;
  declare partType?: PartType;

  static override relationMappings = (): RelationMappings => ({
    ...factRelations('positions'),
    model: {
      relation: CatalogueModel.BelongsToOneRelation,
      modelClass: MachineModel,
      join: { from: 'positions.modelId', to: 'models.id' },
    },
    partType: {
      relation: CatalogueModel.BelongsToOneRelation,
      modelClass: PartType,
      join: { from: 'positions.partTypeId', to: 'part_types.id' },
    },
  });

  static override modifiers: Modifiers<QueryBuilder<Position>> = {
    /** In the order of the checklist. */
    asChecklist: (query) => query.orderBy('positions.ordinal'),
  };
}
