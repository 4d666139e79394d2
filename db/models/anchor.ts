import type { RelationMappings } from 'objection';
import type { DateRange } from '#db/ranges.ts';
import type { DateMeaning, DatePrecision } from '#domain/vocabulary.ts';
import { CatalogueModel, factRelations } from './catalogue-model.ts';
import { Series } from './series.ts';

/** A single machine of a series whose date is known. */
export class Anchor extends CatalogueModel {
  static override readonly tableName = 'anchors';
  static override readonly ranges = ['built'];

  declare seriesId: string;
  declare number: string;
  declare built: { readonly from: string; readonly to: string } & DateRange;
  declare precision: DatePrecision;
  declare meaning: DateMeaning;
  declare note: string | null;

  declare series?: Series;

  static override relationMappings = (): RelationMappings => ({
    ...factRelations('anchors'),
    series: {
      relation: CatalogueModel.BelongsToOneRelation,
      modelClass: Series,
      join: { from: 'anchors.seriesId', to: 'series.id' },
    },
  });
}
