import type { Modifiers, QueryBuilder } from 'objection';
import { RegisterModel } from './register-model.ts';

/** Something that tells a casting from its neighbours, and where on it to look. */
export class CastingTell extends RegisterModel {
  static override readonly tableName = 'casting_tells';
  static override readonly idColumn = ['castingId', 'ordinal'];

  declare castingId: string;
  declare ordinal: number;
  declare place: string;
  declare tell: string;

  static override modifiers: Modifiers<QueryBuilder<CastingTell>> = {
    inOrder: (query) => query.orderBy('casting_tells.ordinal'),
  };
}
