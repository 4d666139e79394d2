import type { RelationMappings } from 'objection';
import type { RangeStanding } from '#domain/serials/build-window.ts';
import type { DateRange, NumberRange } from '#db/ranges.ts';
import type { DateMeaning, DatePrecision } from '#domain/vocabulary.ts';
import { Account } from './account.ts';
import { CatalogueModel, factRelations } from './catalogue-model.ts';
import { Series } from './series.ts';

/** When the numbers of one stretch of a series were built, by one account. */
export class SerialRange extends CatalogueModel {
  static override readonly tableName = 'serial_ranges';
  static override readonly ranges = ['numbers', 'built'];

  declare slug: string;
  declare seriesId: string;
  declare accountId: string;
  /** First and last number; no last: nobody knows where the range ends. */
  declare numbers: NumberRange & { readonly from: string };
  declare built: { readonly from: string; readonly to: string } & DateRange;
  declare precision: DatePrecision;
  declare standing: RangeStanding;
  /** Whether its source says the numbers were issued in order. */
  declare inOrder: boolean;
  declare meaning: DateMeaning;
  declare note: string | null;

  declare series?: Series;
  declare account?: Account;

  static override relationMappings = (): RelationMappings => ({
    ...factRelations('serial_ranges'),
    series: {
      relation: CatalogueModel.BelongsToOneRelation,
      modelClass: Series,
      join: { from: 'serial_ranges.seriesId', to: 'series.id' },
    },
    account: {
      relation: CatalogueModel.BelongsToOneRelation,
      modelClass: Account,
      join: { from: 'serial_ranges.accountId', to: 'accounts.id' },
    },
  });
}
