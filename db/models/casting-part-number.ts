import type { Modifiers, QueryBuilder } from 'objection';
import { RegisterModel } from './register-model.ts';

/** A part number a casting was machined into. One casting became several, and one number came from several castings. */
export class CastingPartNumber extends RegisterModel {
  static override readonly tableName = 'casting_part_numbers';
  static override readonly idColumn = ['castingId', 'ordinal'];

  declare castingId: string;
  declare ordinal: number;
  declare number: string;
  /** The number's letters and digits alone; worked out by the database. */
  declare readonly numberKey: string;
  declare note: string | null;

  static override modifiers: Modifiers<QueryBuilder<CastingPartNumber>> = {
    inOrder: (query) => query.orderBy('casting_part_numbers.ordinal'),
  };
}
