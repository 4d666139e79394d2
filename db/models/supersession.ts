import type { RelationMappings } from 'objection';
import type { Interchange } from '#domain/vocabulary.ts';
import { Casting } from './casting.ts';
import { CatalogueModel, factRelations } from './catalogue-model.ts';

/** One casting followed by another. */
export class Supersession extends CatalogueModel {
  static override readonly tableName = 'supersessions';

  /** That of both castings. */
  declare partTypeId: string;
  declare oldId: string;
  declare newId: string;
  declare interchange: Interchange;
  declare note: string | null;

  declare oldCasting?: Casting;
  declare newCasting?: Casting;

  static override relationMappings = (): RelationMappings => ({
    ...factRelations('supersessions'),
    oldCasting: {
      relation: CatalogueModel.BelongsToOneRelation,
      modelClass: Casting,
      join: { from: 'supersessions.oldId', to: 'castings.id' },
    },
    newCasting: {
      relation: CatalogueModel.BelongsToOneRelation,
      modelClass: Casting,
      join: { from: 'supersessions.newId', to: 'castings.id' },
    },
  });
}
