import type { RelationMappings } from 'objection';
import type { MeasureUnit, WearDirection } from '#domain/vocabulary.ts';
import { CatalogueModel, factRelations } from './catalogue-model.ts';
import { MachineModel } from './machine-model.ts';
import { PartType } from './part-type.ts';

/** How far a measure of a part may wear. */
export class WearLimit extends CatalogueModel {
  static override readonly tableName = 'wear_limits';

  declare partTypeId: string;
  /** `null`: on every model. */
  declare modelId: string | null;
  declare measure: string;
  declare unit: MeasureUnit;
  /** Smallest and largest of a new part; `null` where nobody says. */
  declare asBuiltFrom: number | null;
  declare asBuiltTo: number | null;
  declare direction: WearDirection;
  /** The limit. */
  declare wearsTo: number;
  declare method: string | null;
  declare note: string | null;

  declare partType?: PartType;
  declare model?: MachineModel | null;

  static override relationMappings = (): RelationMappings => ({
    ...factRelations('wear_limits'),
    partType: {
      relation: CatalogueModel.BelongsToOneRelation,
      modelClass: PartType,
      join: { from: 'wear_limits.partTypeId', to: 'part_types.id' },
    },
    model: {
      relation: CatalogueModel.BelongsToOneRelation,
      modelClass: MachineModel,
      join: { from: 'wear_limits.modelId', to: 'models.id' },
    },
  });
}
