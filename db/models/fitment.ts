import type { RelationMappings } from 'objection';
import type { NumberRange } from '#db/ranges.ts';
import type { FitmentVerdict } from '#domain/vocabulary.ts';
import { Casting } from './casting.ts';
import { CatalogueModel, factRelations } from './catalogue-model.ts';
import { Position } from './position.ts';
import { Series } from './series.ts';

/** What a casting is at a position, on some numbers of a series or on all. */
export class Fitment extends CatalogueModel {
  static override readonly tableName = 'fitments';
  static override readonly ranges = ['numbers'];

  declare castingId: string;
  declare positionId: string;
  /** That of the position and of the series. */
  declare modelId: string;
  /** That of the casting and of the position. */
  declare partTypeId: string;
  /** `null`: every series of the model, and then every number. */
  declare seriesId: string | null;
  /** Both ends open: every number. */
  declare numbers: NumberRange;
  declare verdict: FitmentVerdict;
  declare note: string | null;

  declare casting?: Casting;
  declare position?: Position;
  declare series?: Series | null;

  static override relationMappings = (): RelationMappings => ({
    ...factRelations('fitments'),
    casting: {
      relation: CatalogueModel.BelongsToOneRelation,
      modelClass: Casting,
      join: { from: 'fitments.castingId', to: 'castings.id' },
    },
    position: {
      relation: CatalogueModel.BelongsToOneRelation,
      modelClass: Position,
      join: { from: 'fitments.positionId', to: 'positions.id' },
    },
    series: {
      relation: CatalogueModel.BelongsToOneRelation,
      modelClass: Series,
      join: { from: 'fitments.seriesId', to: 'series.id' },
    },
  });
}
