import type { RelationMappings } from 'objection';
import { Account } from './account.ts';
import { RegisterModel } from './register-model.ts';

/** An account that speaks of a series; at most one of a series is preferred. */
export class SeriesAccount extends RegisterModel {
  static override readonly tableName = 'series_accounts';
  static override readonly idColumn = ['seriesId', 'accountId'];

  declare seriesId: string;
  declare accountId: string;
  declare preferred: boolean;

  declare account?: Account;

  static override relationMappings = (): RelationMappings => ({
    account: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Account,
      join: { from: 'series_accounts.accountId', to: 'accounts.id' },
    },
  });
}
