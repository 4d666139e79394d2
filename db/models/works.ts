import type { RelationMappings } from 'objection';
import { CatalogueModel, factRelations } from './catalogue-model.ts';
import { Maker } from './maker.ts';

/** A place a maker built or poured at. */
export class Works extends CatalogueModel {
  static override readonly tableName = 'works';

  declare makerId: string;
  /** Unique within the maker. */
  declare slug: string;
  declare name: string;
  declare place: string | null;
  declare note: string | null;

  declare maker?: Maker;

  static override relationMappings = (): RelationMappings => ({
    ...factRelations('works'),
    maker: { relation: CatalogueModel.BelongsToOneRelation, modelClass: Maker, join: { from: 'works.makerId', to: 'makers.id' } },
  });
}
