import type { RelationMappings } from 'objection';
import type { DateRange } from '#db/ranges.ts';
import type { MachineKind } from '#domain/vocabulary.ts';
import { CatalogueModel, factRelations } from './catalogue-model.ts';
import { Maker } from './maker.ts';

/** A model of machine. */
export class MachineModel extends CatalogueModel {
  static override readonly tableName = 'models';
  static override readonly ranges = ['made'];

  declare makerId: string;
  declare slug: string;
  declare name: string;
  declare machineKind: MachineKind;
  declare made: DateRange | null;
  declare note: string | null;

  declare maker?: Maker;

  static override relationMappings = (): RelationMappings => ({
    ...factRelations('models'),
    maker: {
      relation: CatalogueModel.BelongsToOneRelation,
      modelClass: Maker,
      join: { from: 'models.makerId', to: 'makers.id' },
    },
  });
}
