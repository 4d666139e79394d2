import type { RelationMappings } from 'objection';
import { RegisterModel } from './register-model.ts';
import { Source } from './source.ts';

/** Somebody's list of serial numbers and dates. Several may speak of one series and disagree. */
export class Account extends RegisterModel {
  static override readonly tableName = 'accounts';

  declare id: string;
  declare slug: string;
  declare title: string;
  declare sourceId: string;

  declare source?: Source;

  static override relationMappings = (): RelationMappings => ({
    source: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Source,
      join: { from: 'accounts.sourceId', to: 'sources.id' },
    },
  });
}
