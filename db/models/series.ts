import type { RelationMappings } from 'objection';
import { CatalogueModel, factRelations } from './catalogue-model.ts';
import { MachineModel } from './machine-model.ts';
import { SeriesAccount } from './series-account.ts';
import { Works } from './works.ts';

/** One run of serial numbers. */
export class Series extends CatalogueModel {
  static override readonly tableName = 'series';

  declare modelId: string;
  /** That of the model and of the works. */
  declare makerId: string;
  /** Capitals and digits, without separators; may be empty. */
  declare prefix: string;
  declare worksId: string | null;
  /** Tells a run that started again from the one before it. */
  declare label: string | null;
  declare note: string | null;

  declare model?: MachineModel;
  declare works?: Works | null;
  declare seriesAccounts?: SeriesAccount[];

  static override relationMappings = (): RelationMappings => ({
    ...factRelations('series'),
    model: {
      relation: CatalogueModel.BelongsToOneRelation,
      modelClass: MachineModel,
      join: { from: 'series.modelId', to: 'models.id' },
    },
    works: { relation: CatalogueModel.BelongsToOneRelation, modelClass: Works, join: { from: 'series.worksId', to: 'works.id' } },
    seriesAccounts: {
      relation: CatalogueModel.HasManyRelation,
      modelClass: SeriesAccount,
      join: { from: 'series.id', to: 'series_accounts.seriesId' },
    },
  });
}
