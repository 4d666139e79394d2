import type { RelationMappings } from 'objection';
import { RegisterModel } from './register-model.ts';
import { Source } from './source.ts';

/** A source standing behind a fact, or behind one field of it. */
export class FactSource extends RegisterModel {
  static override readonly tableName = 'fact_sources';

  declare id: string;
  declare factId: string;
  declare sourceId: string;
  /** `null`: the whole fact. `made`: that field. `tells.2`: the second entry of that list. */
  declare field: string | null;
  /** Where in the source: a page, a sheet, a plate. */
  declare locator: string | null;
  declare note: string | null;

  declare source?: Source;

  static override relationMappings = (): RelationMappings => ({
    source: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Source,
      join: { from: 'fact_sources.sourceId', to: 'sources.id' },
    },
  });
}
