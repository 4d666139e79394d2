import type { Modifiers, QueryBuilder, RelationMappings } from 'objection';
import { Member } from './member.ts';
import { RegisterModel } from './register-model.ts';

/** What one member read at a mark. */
export class Reading extends RegisterModel {
  static override readonly tableName = 'readings';

  declare id: string;
  declare markId: string;
  declare readerId: string;
  /** In the mark notation, as `writeReading` writes it. */
  declare text: string;
  declare madeAt: string;

  declare reader?: Member;

  static override relationMappings = (): RelationMappings => ({
    reader: {
      relation: RegisterModel.BelongsToOneRelation,
      modelClass: Member,
      join: { from: 'readings.readerId', to: 'members.id' },
    },
  });

  static override modifiers: Modifiers<QueryBuilder<Reading>> = {
    newestFirst: (query) => query.orderBy([
      { column: 'readings.madeAt', order: 'desc' },
      { column: 'readings.id', order: 'desc' },
    ]),
  };
}
